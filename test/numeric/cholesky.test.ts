import { expect, test } from "vitest";
import { choleskyFactor, choleskyInverse, choleskySolve } from "../../src/numeric/index.js";

// The Hilbert matrix of order 4 has the whole-number inverse below.
// Source: Choi (1983), Tricks or treats with the Hilbert matrix, The American Mathematical Monthly 90:301.
const hilbert = Float64Array.from({ length: 16 }, (_, k) => 1 / (Math.floor(k / 4) + (k % 4) + 1));
const inverse = [
  16, -120, 240, -140, -120, 1200, -2700, 1680, 240, -2700, 6480, -4200, -140, 1680, -4200, 2800,
];

test("inverts and solves", () => {
  const factor = choleskyFactor(hilbert, 4)!;
  // Condition number 1.6e4, so 11 digits remain.
  choleskyInverse(factor, 4).forEach((value, i) => {
    expect(Math.abs(value / inverse[i]! - 1)).toBeLessThan(1e-11);
  });
  const sums = Float64Array.from({ length: 4 }, (_, i) =>
    hilbert.slice(4 * i, 4 * i + 4).reduce((a, b) => a + b),
  );
  choleskySolve(factor, sums, 4).forEach((value) => {
    expect(Math.abs(value - 1)).toBeLessThan(1e-11);
  });
});

test("has no factor for a matrix that is not positive definite", () => {
  expect(choleskyFactor(Float64Array.of(1, 2, 2, 1), 2)).toBeUndefined();
});
