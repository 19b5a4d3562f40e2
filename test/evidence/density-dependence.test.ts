import { expect, test } from "vitest";
import { densityDependence } from "../../src/evidence/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { yeast } from "../published/carlson-yeast.js";
import { series } from "./series.js";

// Source: R 4.2.2, lm(log(x1/x0) ~ x0) on Carlson's yeast; coefficients printed to ten digits.
test("regression of the log growth ratio on the level (R lm)", () => {
  const [found] = densityDependence(series(yeast), { resamples: 199 }).groups;
  expect(Math.abs(found!.intercept / 0.5217460871 - 1)).toBeLessThan(1e-9);
  expect(Math.abs(found!.slope / -0.0008031497502 - 1)).toBeLessThan(1e-9);
  expect(found!.found).toBe(true);
});

// Source: the level of the test; 400 records, four binomial errors of 5% are 4.4 points. A t-test calls far more.
test("finds density dependence in 5% of records that grow by chance alone", () => {
  const stream = randomStream(12);
  let found = 0;
  let byTable = 0;
  for (let k = 0; k < 400; k++) {
    const values = [50];
    for (let t = 1; t < 25; t++) values.push(values[t - 1]! * Math.exp(0.2 * stream.normal()));
    const [group] = densityDependence(series(values), { resamples: 199, seed: k }).groups;
    if (group!.found) found++;
    // t(22) at 5%, one-sided.
    if (group!.statistic < -1.717) byTable++;
  }
  expect(Math.abs(found / 400 - 0.05)).toBeLessThan(0.044);
  expect(byTable / 400).toBeGreaterThan(0.15);
});

test("passes over pairs across a gap, and refuses levels without a logarithm", () => {
  expect(() => densityDependence(series([3, 4, 0, 5, 6, 7, 8]))).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The test needs at least four steps of one period between positive levels of N. Leave out levels of zero with a reason, name the state with { state }, or wait for more rows.]`,
  );
});
