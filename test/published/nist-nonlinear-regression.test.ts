// Source: NIST/ITL, Statistical Reference Datasets, Nonlinear Regression; certified to 11 digits.
// Digits are -log10 of the relative error. Held to 6 for parameters and sums of squares, 4 for standard deviations.
// Lanczos1 was made from its model with 14 digits: its sum of squares, 1.43E-25, is below the reach of double
// precision, so only its parameters are compared.
import { describe, expect, test } from "vitest";
import { leastSquares } from "../../src/numeric/index.js";
import { correctDigits, fewestDigits } from "./nist/correct-digits.js";
import { problems, residualsOf } from "./nist/problems.js";

describe.each(problems)("leastSquares solves $problem without a Jacobian", (problem) => {
  test.each([1, 2])("from start %i", (number) => {
    const found = leastSquares({ residuals: residualsOf(problem), start: problem.starts[number - 1]! });
    expect(found.stop.kind).toBe("converged");
    expect(fewestDigits(found.estimates, problem.estimates)).toBeGreaterThanOrEqual(6);
    if (problem.problem === "Lanczos1") return;
    expect(correctDigits(found.sumOfSquares, problem.sumOfSquares)).toBeGreaterThanOrEqual(6);
    expect(fewestDigits(found.standardErrors, problem.standardDeviations)).toBeGreaterThanOrEqual(4);
  });

  test.each([1e-6, 1e6])("with responses multiplied by %f", (scale) => {
    const found = leastSquares({ residuals: residualsOf(problem, scale), start: problem.starts[1]! });
    expect(fewestDigits(found.estimates, problem.estimates)).toBeGreaterThanOrEqual(6);
  });
});
