import { expect, test } from "vitest";
import { distributions, gammaDraw, poissonDraw, randomStream } from "../../src/numeric/index.js";

/** Sum of (found - expected)^2 / expected over the classes into which rising edges divide the values. */
function chiSquare(values: readonly number[], edges: readonly number[], below: readonly number[]): number {
  const upTo = [...edges, Number.POSITIVE_INFINITY].map(
    (edge) => values.filter((value) => value <= edge).length,
  );
  const shares = [...below, 1].map((share, i) => share - (below[i - 1] ?? 0));
  return shares.reduce((sum, share, i) => {
    const expected = share * values.length;
    return sum + (upTo[i]! - (upTo[i - 1] ?? 0) - expected) ** 2 / expected;
  }, 0);
}

// Source: the distributions, which test/published holds to mpmath; 99.9% points of chi-square from SciPy 1.17.1.
const classes = [0.01, 0.05, 0.15, 0.3, 0.5, 0.7, 0.85, 0.95, 0.99];
const acceptable = 27.88; // 9 degrees of freedom

test.each([0.05, 0.7, 1, 1.4, 3, 40, 2000])("gamma values of shape %f have its frequencies", (shape) => {
  const gamma = distributions.gamma(shape, 1);
  const stream = randomStream(8);
  const values = Array.from({ length: 60_000 }, () => gammaDraw(shape, stream));
  expect(chiSquare(values, classes.map(gamma.quantile), classes)).toBeLessThan(acceptable);
});

test.each([0.3, 4, 29, 31, 120, 5000, 1e7])("counts of mean %f have their frequencies", (mean) => {
  const poisson = distributions.poisson(mean);
  const stream = randomStream(9);
  const values = Array.from({ length: 60_000 }, () => poissonDraw(mean, stream));
  expect(values.every(Number.isInteger)).toBe(true);
  // Classes end at whole numbers, each once.
  const edges = [...new Set(classes.map(poisson.quantile))];
  expect(chiSquare(values, edges, edges.map(poisson.cumulative))).toBeLessThan(acceptable);
});

test("a count of mean 0 is 0, and one of no possible mean is missing", () => {
  const stream = randomStream(1);
  expect(poissonDraw(0, stream)).toBe(0);
  expect([-1, Number.NaN, Number.POSITIVE_INFINITY].map((mean) => poissonDraw(mean, stream))).toEqual([
    Number.NaN,
    Number.NaN,
    Number.NaN,
  ]);
});
