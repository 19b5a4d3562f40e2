/**
 * One path of a million periods and 10,000 paths of 1,000 periods, without and with lognormal change, against the
 * same loops in C; and an attractor diagram of 1,000 columns with 1,000 points each. All in processor time, so that
 * other work on the machine does not count.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { bench } from "vitest";
import { attractor } from "../../src/dynamics/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { blockStreams, noiseDraw, runEnsemble } from "../../src/projection/index.js";
import { compileRule, recurrence } from "../../src/rule/index.js";
import { compiledInC } from "./time-in-c.js";

const paths = 10_000;
const periods = 1_000;
const compiled = compileRule(recurrence("x[t+1] = r*x*(1 - x)"));
const parameters = Float64Array.of(1.5);
const values = new Float64Array(1_000_001);

function leastMilliseconds(work: () => void, rounds = 10): number {
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < rounds; round++) {
    const from = process.cpuUsage();
    work();
    const { user, system } = process.cpuUsage(from);
    least = Math.min(least, (user + system) / 1000);
  }
  return least;
}

function onePath(): void {
  compiled.path(Float64Array.of(0.3), Float64Array.of(3.7), [], 0, 1_000_000, values);
}

/** The steps of all paths, without what a projection does with every row. */
function stepsAlone(): void {
  const present = new Float64Array(paths).fill(0.3);
  for (let block = 0; block < paths; block += 1024)
    for (let t = 0; t < periods; t++)
      compiled.advance(present, block, Math.min(paths, block + 1024), parameters, [], t);
}

function projected(sd: number): void {
  runEnsemble({
    compiled,
    width: 1,
    inputs: [],
    from: 0,
    periods,
    starts: { paths, size: 1, parameters, initial: Float64Array.of(0.3) },
    change: [sd === 0 ? undefined : noiseDraw({ distribution: "lognormal", sd, centre: "mean" })],
    reading: [undefined],
    bounds: [
      {
        low: Number.NEGATIVE_INFINITY,
        high: Number.POSITIVE_INFINITY,
        absorbsLow: false,
        absorbsHigh: false,
      },
    ],
    streams: blockStreams(randomStream(1), paths),
    onRow: () => undefined,
  });
}

function diagram(): void {
  const rule = recurrence("x[t+1] = r*x*(1 - x)");
  attractor(rule, { vary: "r", values: { from: 2.8, to: 4, count: 1000 }, periods: 1000, initial: [0.3] });
}

const program = compiledInC(readFileSync(join(__dirname, "ensembles.c"), "utf8"));
const [one, many, noisy] = program?.run([]) ?? [];
program?.remove();
const works: readonly (readonly [string, () => void, number | undefined])[] = [
  ["one path of 10^6 periods", onePath, one],
  ["10^7 steps, no noise, steps alone", stepsAlone, many],
  ["10^7 steps, no noise, as projected", () => projected(0), many],
  ["10^7 steps, lognormal, as projected", () => projected(0.1), noisy],
];
for (const [name, work, inC] of works) {
  const own = leastMilliseconds(work);
  console.log(
    `${name}: ${own.toFixed(1)} ms, ${inC === undefined ? "no gcc here" : `${(own / inC).toFixed(2)} x C`}`,
  );
}
console.log(`attractor diagram of 1,000 x 1,000: ${leastMilliseconds(diagram, 3).toFixed(0)} ms`);

bench("one path of 10^6 periods", onePath, { iterations: 5, time: 100 });
