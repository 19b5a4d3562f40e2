import { spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { afterAll, beforeAll, expect, test } from "vitest";

const root = join(import.meta.dirname, "..", "..");
const cruiser = join(root, "node_modules", "dependency-cruiser", "bin", "dependency-cruise.mjs");
const folder = mkdtempSync(join(tmpdir(), "periodwise-rooms-"));

/** Files of a small tree in which each rule is broken once, and nothing else is wrong. */
const planted: Readonly<Record<string, string>> = {
  "src/numeric/index.ts": 'export { a } from "./a.js";',
  "src/numeric/a.ts": 'import { c } from "../rule/index.js";\nexport const a: number = c;',
  "src/rule/index.ts": 'export { c } from "./c.js";',
  "src/rule/c.ts": "export const c: number = 1;",
  "src/rule/reads-a-file.ts":
    'import { readFileSync } from "node:fs";\nexport const text: string = readFileSync("x", "utf8");',
  "src/dynamics/index.ts": 'import { c } from "../rule/c.js";\nexport const d: number = c;',
  "src/kernel/index.ts": 'import { c } from "../rule/index.js";\nexport const k: number = c;',
  "src/casework/index.ts": "export const work: number = 1;",
  "src/record/index.ts": 'import { first } from "./first.js";\nexport const second: number = first;',
  "src/record/first.ts": 'import { second } from "./index.js";\nexport const first: number = second;',
  "kernel-helpers/index.ts": 'import { c } from "../src/rule/c.js";\nexport const h: number = c;',
  "kernel-helpers/wording/index.ts": 'import { h } from "../index.js";\nexport const words: number = h;',
  "kernel-helpers/wording/list.ts": "export const list: number = 1;",
  "kernel-helpers/lists.ts": 'import { list } from "./wording/list.js";\nexport const l: number = list;',
  "kernel-helpers/drives.ts":
    'import { work } from "../src/casework/index.js";\nexport const w: number = work;',
  "tsconfig.json": '{ "compilerOptions": { "module": "node20", "target": "es2022" } }',
  "package.json": '{ "type": "commonjs" }',
};

let broken: Set<string>;

beforeAll(() => {
  for (const [file, text] of Object.entries(planted)) {
    mkdirSync(dirname(join(folder, file)), { recursive: true });
    writeFileSync(join(folder, file), text);
  }
  symlinkSync(join(root, "node_modules"), join(folder, "node_modules"));
  const config = join(root, "test", "architecture", "rooms.cjs");
  const done = spawnSync(
    process.execPath,
    [cruiser, "--config", config, "--output-type", "json", "src", "kernel-helpers"],
    { cwd: folder, encoding: "utf8" },
  );
  const report = JSON.parse(done.stdout) as { summary: { violations: { rule: { name: string } }[] } };
  broken = new Set(report.summary.violations.map((violation) => violation.rule.name));
});

afterAll(() => rmSync(folder, { recursive: true, force: true }));

test.each([
  "numeric-imports-only-what-comes-before",
  "kernel-imports-only-what-comes-before",
  "no-cycles",
  "a-room-is-entered-through-its-index",
  "helpers-enter-rooms-through-their-index",
  "helpers-do-not-drive-the-kernel",
  "wording-imports-nothing-else",
  "wording-is-entered-through-its-index",
  "pure-rooms-touch-no-node-built-in",
])("the import rule %s fails on a planted violation", (rule) => {
  expect([...broken]).toContain(rule);
});
