// Held to: at most 1.3 times the same search and the same arithmetic by hand in C.
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { bench } from "vitest";
import { trajectorySystem } from "../../src/estimate/systems/trajectory-system.js";
import { unknownsOf } from "../../src/estimate/unknowns/unknowns.js";
import { minimiseSquares, randomStream, squaresWorkspace } from "../../src/numeric/index.js";
import { compileRule, recurrence } from "../../src/rule/index.js";
import { compiledInC, leastMicroseconds } from "./time-in-c.js";

const count = 40;
const stream = randomStream(20260401);
const observed = new Float64Array(count);
for (let t = 0, level = 10; t < count; t++) {
  observed[t] = level + 6 * stream.normal();
  level = (1.35 * level) / (1 + (0.35 * level) / 650);
}

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const workspace = squaresWorkspace(3);
const system = trajectorySystem(
  compileRule(sheltered).pathSums!(false),
  unknownsOf(sheltered, { errors: "observation" }),
  { inputs: [], first: 0, periods: count - 1, table: observed, weights: new Float64Array(count).fill(1) },
);
const start = Float64Array.of(1.5, 500, 15);
const fitOnce = (): void => {
  minimiseSquares(system, start, { workspace });
};

const inC = compiledInC(readFileSync(join(__dirname, "trajectory-fit.c"), "utf8"));
if (inC === undefined) console.log("trajectory fit: no gcc here, nothing to compare with");
else {
  const values = Array.from(observed, String);
  // Interleaved in short rounds, the least of each kept: what else runs on the machine slows the rest.
  let ours = Number.POSITIVE_INFINITY;
  let theirs = Number.POSITIVE_INFINITY;
  let calls = 0;
  for (let round = 0; round < 5; round++) {
    ours = Math.min(ours, leastMicroseconds(fitOnce, 1000, 60));
    const [least, made] = inC.run(values) as [number, number];
    theirs = Math.min(theirs, least);
    calls = made;
  }
  const same = minimiseSquares(system, start, { workspace }).evaluations === calls;
  console.log(
    `trajectory fit, 3 unknowns, ${count} observations: ${ours.toFixed(2)} us, by hand in C ${theirs.toFixed(2)} us, ` +
      `ratio ${(ours / theirs).toFixed(2)} (held to 1.3; ${same ? "the same evaluations" : "other evaluations"})`,
  );
  inC.remove();
}

bench("trajectory fit of 3 unknowns on 40 observations", fitOnce);
