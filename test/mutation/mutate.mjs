/**
 * Mutation testing of a room or a file: `npm run mutate -- src/numeric`.
 *
 * Draws a seeded sample of mutants, runs the room's tests against each, and prints the share that the tests detect
 * and every mutant that they do not. Options: `--count 200` (0 tests all), `--seed 1`, and `--tests test/published`
 * for test files or folders beside `test/<room>`, any number of times.
 */
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, rmSync, statSync } from "node:fs";
import { dirname, join, relative, resolve, sep } from "node:path";
import { fileURLToPath } from "node:url";
import { parseArgs } from "node:util";
import { Stryker } from "@stryker-mutator/core";
import { Instrumenter } from "@stryker-mutator/instrumenter";
import { mutantKey } from "./sampled-mutants.mjs";

const root = join(dirname(fileURLToPath(import.meta.url)), "..", "..");
const scratch = "test/out/mutation";

/** Tests that stand in a folder of their own and check one room all the same. */
const testsElsewhere = {
  numeric: ["test/published/distributions.test.ts", "test/published/nist-nonlinear-regression.test.ts"],
  dynamics: ["test/property/dynamics.test.ts"],
  rule: ["test/property/rule.test.ts"],
};

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: {
    count: { type: "string", default: "200" },
    seed: { type: "string", default: "1" },
    tests: { type: "string", multiple: true, default: [] },
  },
});
if (positionals.length === 0) {
  console.error("Name a room or files: npm run mutate -- src/numeric");
  process.exit(2);
}

const sources = positionals.flatMap((place) => filesIn(place, /^(?!.*\.d\.ts$).*\.ts$/));
const rooms = [...new Set(sources.map((file) => file.split("/")[1]))];
const tests = rooms
  .flatMap((room) => [`test/${room}`, ...(testsElsewhere[room] ?? [])])
  .concat(values.tests)
  .flatMap((place) => filesIn(place, /\.test\.ts$/));

const mutants = await mutantsOf(sources);
const sample = sampleOf(mutants, Number(values.count), values.seed);
console.log(
  `${sources.length} files, ${mutants.length} mutants, ${sample.size} tested (seed ${values.seed}).`,
);

process.env.PERIODWISE_MUTATION_TESTS = tests.join(",");
const results = await new Stryker({
  mutate: sources,
  testRunner: "vitest",
  vitest: { configFile: "test/mutation/vitest.config.ts", related: false },
  coverageAnalysis: "perTest",
  checkers: ["sampled-mutants"],
  plugins: ["@stryker-mutator/vitest-runner", join(root, "test", "mutation", "sampled-mutants.mjs")],
  sampledMutants: [...sample],
  warnings: { unknownOptions: false },
  ignorePatterns: ["dist", "notebooks", ".git", "test/out"],
  tempDirName: scratch,
  disableTypeChecks: false,
  reporters: ["progress-append-only"],
  logLevel: "warn",
  timeoutMS: 10_000,
}).runMutationTest();
rmSync(join(root, scratch), { recursive: true, force: true });

const valid = results.filter(({ status }) => status !== "RuntimeError" && status !== "CompileError");
// A change that keeps test files from loading leaves tests out, none of which then fails.
const everyTest = Math.max(...valid.map(({ testsCompleted = 0 }) => testsCompleted));
const undetected = valid.filter(
  (result) =>
    result.status === "NoCoverage" ||
    (result.status === "Survived" && !(result.static && result.testsCompleted < everyTest)),
);
for (const result of undetected.sort(inReadingOrder)) console.log(describe(result));
const detected = valid.length - undetected.length;
const score = ((100 * detected) / valid.length).toFixed(1);
console.log(`${detected} of ${valid.length} mutants detected: mutation score ${score}%`);

function filesIn(place, pattern) {
  const whole = resolve(root, place);
  if (!existsSync(whole)) return [];
  if (statSync(whole).isFile()) return [slashed(relative(root, whole))];
  return readdirSync(whole, { recursive: true })
    .map((name) => slashed(relative(root, join(whole, name))))
    .filter((name) => pattern.test(name))
    .sort();
}

function slashed(path) {
  return path.split(sep).join("/");
}

async function mutantsOf(names) {
  const quiet = { debug() {}, info() {}, isDebugEnabled: () => false };
  const files = names.map((name) => ({
    name: join(root, name),
    mutate: true,
    content: readFileSync(join(root, name), "utf8"),
  }));
  const options = { ignorers: [], excludedMutations: [], plugins: null };
  return (await new Instrumenter(quiet).instrument(files, options)).mutants;
}

/** Takes the mutants whose hashes come first, so that a change elsewhere leaves most of a sample as it was. */
function sampleOf(all, count, seed) {
  const rank = (mutant) =>
    createHash("sha256")
      .update(`${seed}:${relative(root, mutant.fileName)}:${mutantKey({ ...mutant, fileName: "" })}`)
      .digest("hex");
  const ranked = all.map((mutant) => [rank(mutant), mutantKey(mutant)]).sort(([a], [b]) => (a < b ? -1 : 1));
  return new Set(ranked.slice(0, count === 0 ? all.length : count).map(([, key]) => key));
}

function inReadingOrder(a, b) {
  if (a.fileName !== b.fileName) return a.fileName < b.fileName ? -1 : 1;
  return a.location.start.line - b.location.start.line || a.location.start.column - b.location.start.column;
}

function describe({ fileName, location: { start, end }, mutatorName, replacement, status }) {
  const lines = readFileSync(fileName, "utf8")
    .split("\n")
    .slice(start.line - 1, end.line);
  const last = lines.length - 1;
  lines[last] = lines[last].slice(0, end.column - 1);
  lines[0] = lines[0].slice(start.column - 1);
  const code = lines.join(" ").replace(/\s+/g, " ").slice(0, 160);
  const place = `${slashed(relative(root, fileName))}:${start.line}:${start.column}`;
  return `${place} ${mutatorName}${status === "NoCoverage" ? " (no test runs it)" : ""}\n    ${code}\n  ->  ${replacement.slice(0, 160)}`;
}
