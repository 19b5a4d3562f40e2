// The same digits whoever fits: a fit depends on nothing but its rule, record and options.
import { join } from "node:path";
import { Worker } from "node:worker_threads";
import { expect, test } from "vitest";

const helpers = join(import.meta.dirname, "..", "..", "dist", "kernel-helpers", "index.js");

/** Fits records number `first`, `first + step`, ... below 60, and gives every digit of what it found. */
const code = `
const { parentPort, workerData } = require("node:worker_threads");
const { bootstrap, fit, observations, recurrence } = require(workerData.helpers);
const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const found = [];
for (let number = workerData.first; number < 60; number += workerData.step) {
  const week = [...Array(15).keys()];
  const value = week.map((t) => (100 + number) / (1 + 9 * 1.6 ** -t) * (1 + 0.05 * Math.sin(7.3 * t + number)));
  const record = observations({ week, value }, { period: "week", step: { every: 1, of: "week" }, value: "value" });
  const fitted = fit(rule, record, { errors: "observation", distribution: "lognormal" });
  const drawn = number < 4 ? bootstrap(fitted, { seed: number, resamples: 100 }) : undefined;
  found.push([number, JSON.stringify([fitted.groups[0].estimates, drawn])]);
}
parentPort.postMessage(found);
`;

function share(first: number, step: number): Promise<[number, string][]> {
  return new Promise((resolve, reject) => {
    const worker = new Worker(code, { eval: true, workerData: { helpers, first, step } });
    worker.once("message", resolve);
    worker.once("error", reject);
  });
}

test("60 fits and their bootstraps give the same digits from one worker and from two", async () => {
  const one = await share(0, 1);
  const two = (await Promise.all([share(0, 2), share(1, 2)])).flat().sort(([a], [b]) => a - b);
  expect(two).toEqual(one);
});
