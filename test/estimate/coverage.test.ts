// The small, seeded form of test/bench/coverage.bench.ts: 60 simulated records a design. A 95% interval holds the truth in
// 57 of 60 on average, with a binomial standard deviation of 1.7; fewer than 51 lies beyond three of them.
import { expect, test } from "vitest";
import { randomStream, studentCdf } from "../../src/numeric/index.js";
import { coverageOf } from "../bench/coverage.js";
import { type Design, designs } from "../bench/coverage-designs.js";

const records = 60;
const named = (name: string): Design => designs.find((design) => design.name.startsWith(name))!;

test.each([
  "geometric growth, 8 readings",
  "Beverton-Holt, 20 readings, 10%",
  "Beverton-Holt, 30 periods with a third missing",
  "Beverton-Holt, 20 means of 3 replicates",
  "geometric decline, 20 readings, the lowest below a limit",
  "one step, affine with slope 0.5",
  "state-space, wandering level",
])("intervals hold the truth: %s", (name) => {
  for (const { covered } of coverageOf(named(name), records, 7))
    expect(covered * records).toBeGreaterThanOrEqual(51);
});

// 190 of 200 on average, with a binomial standard deviation of 3.1: fewer than 181 lies beyond three of them.
test.each(["normal errors", "t errors on 3"])("robust intervals hold the truth: %s", (errors) => {
  const design = designs.find(({ name }) => name.startsWith("robust") && name.endsWith(errors))!;
  for (const { covered } of coverageOf(design, 200, 11)) expect(covered * 200).toBeGreaterThanOrEqual(181);
});

test.each(["exponential truth fitted with a capacity", "only a product enters"])(
  "what a design cannot determine is called so: %s",
  (name) => {
    const design = named(name);
    const told = coverageOf(design, records, 7).find(({ parameter }) => parameter === design.undetermined)!;
    expect(told.undetermined * records).toBeGreaterThanOrEqual(51);
  },
);

// Source: R 4.2.2: mean +- 1.959963985 s/sqrt(n) of n normal values covers 2 P(t(n - 1) < 1.959963985) - 1. A simulation
// that is right must reproduce this wrong coverage; 20,000 samples, 4 binomial standard deviations.
test.each([
  [5, 0.8784403402],
  [10, 0.9183508683],
  [20, 0.9351665229],
])("simulation reproduces the known coverage of a wrong interval, n = %i", (count, expected) => {
  const stream = randomStream(count);
  const samples = 20_000;
  let covered = 0;
  for (let k = 0; k < samples; k++) {
    const values = Float64Array.from({ length: count }, () => stream.normal());
    const mean = values.reduce((sum, value) => sum + value, 0) / count;
    const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (count - 1);
    if (Math.abs(mean) < 1.959963985 * Math.sqrt(variance / count)) covered++;
  }
  expect(Math.abs(covered / samples - expected)).toBeLessThan(
    4 * Math.sqrt((expected * (1 - expected)) / samples),
  );
  expect(Math.abs(2 * studentCdf(1.959963985, count - 1) - 1 - expected)).toBeLessThan(1e-9);
});
