// Held to: a million paths of 100 periods run with progress and can be stopped, in bounded memory: no more than ten arrays of
// one number a path (80 MB), where keeping the paths would take 800 MB.
import { bench } from "vitest";
import { simulate } from "../../src/projection/index.js";
import { recurrence } from "../../src/rule/index.js";

const rule = recurrence("N[t+1] = N*exp(r*(1 - N/K))");
const asked = {
  parameters: { r: 0.5, K: 100 },
  initial: { N: 50 },
  periods: 100,
  noise: { N: { distribution: "lognormal", sd: 0.2, centre: "mean" } },
  paths: Number(process.env["PERIODWISE_BENCH_PATHS"] ?? 1_000_000),
  watch: [{ fallsTo: 60 }],
} as const;

const before = process.memoryUsage().arrayBuffers;
let most = 0;
let calls = 0;
const began = performance.now();
const found = simulate(rule, {
  ...asked,
  onProgress: () => {
    if (++calls % 1000 === 0) most = Math.max(most, process.memoryUsage().arrayBuffers - before);
  },
});
const seconds = (performance.now() - began) / 1000;
const share = found.groups[0]!.passages[0]!.at.filter(Number.isFinite).length / asked.paths;
console.log(
  `  ${asked.paths} paths of ${asked.periods} periods: ${seconds.toFixed(1)} s, ${calls} calls of progress, ` +
    `${(most / 2 ** 20).toFixed(0)} MB at most, P(below 60) ${share.toFixed(4)}`,
);
const stopped = performance.now();
try {
  let count = 0;
  simulate(rule, {
    ...asked,
    onProgress: () => {
      if (++count === 100) throw new Error("stopped");
    },
  });
} catch (error) {
  console.log(`  stopped after ${(performance.now() - stopped).toFixed(0)} ms: ${(error as Error).message}`);
}

bench("10,000 paths of 100 periods", () => {
  simulate(rule, { ...asked, paths: 10_000 });
});
