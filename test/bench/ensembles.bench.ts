/**
 * One path of a million periods and 10,000 paths of 1,000 periods, without and with lognormal change, against the
 * same loops in C; and an attractor diagram of 1,000 columns with 1,000 points each.
 */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { bench } from "vitest";
import { attractor } from "../../src/dynamics/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { blockStreams, type EnsembleRun, noiseDraw, runEnsemble } from "../../src/projection/index.js";
import { compileRule, recurrence } from "../../src/rule/index.js";
import { compiledInC, leastMicroseconds } from "./time-in-c.js";

const paths = 10_000;
const periods = 1_000;
const compiled = compileRule(recurrence("x[t+1] = r*x*(1 - x)"));
const values = new Float64Array(1_000_001);

function onePath(): void {
  compiled.path(Float64Array.of(0.3), Float64Array.of(3.7), [], 0, 1_000_000, values);
}

function manyPaths(sd: number): void {
  const change = sd === 0 ? [undefined] : [noiseDraw({ kind: "lognormal", sd })];
  const run: EnsembleRun = {
    compiled,
    states: 1,
    width: 1,
    inputs: [],
    from: 0,
    periods,
    starts: { paths, size: 1, constants: Float64Array.of(1.5), initial: Float64Array.of(0.3) },
    change,
    reading: [undefined],
    limits: [[Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY]],
    streams: blockStreams(randomStream(1), paths),
    onRow: () => undefined,
  };
  runEnsemble(run);
}

function diagram(): void {
  const rule = recurrence("x[t+1] = r*x*(1 - x)");
  attractor(rule, { constant: "r", from: 2.8, to: 4, columns: 1000, points: 1000, starts: [0.3] });
}

bench(
  "paths and ensembles, ratios to C",
  () => {
    const program = compiledInC(readFileSync(join(import.meta.dirname, "ensembles.c"), "utf8"));
    const inC = program?.run([]) ?? [];
    program?.remove();
    const own = [onePath, () => manyPaths(0), () => manyPaths(0.1)].map(
      (work) => leastMicroseconds(work, 1, 5) / 1000,
    );
    ["one path of 10^6 periods", "10^7 steps, no noise", "10^7 steps, lognormal"].forEach((name, i) => {
      const ratio = inC[i] === undefined ? "no gcc here" : `${(own[i]! / inC[i]).toFixed(2)} x C`;
      console.log(`${name}: ${own[i]!.toFixed(1)} ms, ${ratio}`);
    });
    console.log(
      `attractor diagram of 1,000 x 1,000: ${(leastMicroseconds(diagram, 1, 3) / 1000).toFixed(0)} ms`,
    );
  },
  { iterations: 1, warmupIterations: 0, time: 0, warmupTime: 0 },
);
