import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { leastSquares } from "../../src/numeric/index.js";

const periods = Array.from({ length: 12 }, (_, t) => t);
const readings = [10.1, 13.4, 18.9, 24.3, 32.2, 40.5, 50.1, 58.2, 67.9, 74.8, 81.2, 86.3];

function growth([capacity, middle, width]: ArrayLike<number> & Iterable<number>, t: number): number {
  return capacity! / (1 + Math.exp((middle! - t) / width!));
}
const residuals = (parameters: Float64Array): number[] =>
  readings.map((reading, t) => reading - growth(parameters, t));
const start = [80, 5, 3];

function close(a: ArrayLike<number | undefined>, b: ArrayLike<number | undefined>, tolerance: number): void {
  expect(a.length).toBe(b.length);
  for (let i = 0; i < a.length; i++) expect(Math.abs(a[i]! / b[i]! - 1)).toBeLessThan(tolerance);
}

describe("leastSquares", () => {
  const plain = leastSquares({ residuals, start });

  test("solves a straight line as the normal equations do", () => {
    // Closed form: slope = Sxy/Sxx, its standard error s/sqrt(Sxx).
    const y = [2.1, 3.9, 6.2, 7.8, 10.1];
    const x = [1, 2, 3, 4, 5];
    const line = leastSquares({ residuals: ([a, b]) => y.map((v, i) => v - a! - b! * x[i]!), start: [0, 0] });
    const middle = y.reduce((sum, v) => sum + v, 0) / 5;
    const slope = x.reduce((sum, v, i) => sum + (v - 3) * (y[i]! - middle), 0) / 10;
    const left = y.reduce((sum, v, i) => sum + (v - middle - slope * (x[i]! - 3)) ** 2, 0);
    close(line.estimates, [middle - 3 * slope, slope], 1e-11);
    close([line.sumOfSquares, line.standardErrors[1]], [left, Math.sqrt(left / 3 / 10)], 1e-11);
  });

  test("gives the same with an exact Jacobian", () => {
    const jacobian = ([capacity, middle, width]: Float64Array): number[] =>
      periods.flatMap((t) => {
        const e = Math.exp((middle! - t) / width!);
        const bend = (capacity! * e) / (1 + e) ** 2 / width!;
        return [-1 / (1 + e), bend, (-bend * (middle! - t)) / width!];
      });
    const exact = leastSquares({ residuals, jacobian, start });
    close(exact.estimates, plain.estimates, 1e-10);
    close(exact.standardErrors, plain.standardErrors, 1e-9);
  });

  test("does not depend on the units of responses and parameters", () => {
    const powers = fc.integer({ min: -9, max: 9 }).map((power) => 10 ** power);
    fc.assert(
      fc.property(powers, powers, powers, (ofReadings, ofTime, ofStart) => {
        const scaled = leastSquares({
          residuals: ([a, b, c]) =>
            residuals(Float64Array.of(a! / ofStart, b! / ofTime, c! / ofTime)).map((r) => r * ofReadings),
          start: [start[0]! * ofStart, start[1]! * ofTime, start[2]! * ofTime],
        });
        const back = [
          scaled.estimates[0]! / ofStart,
          scaled.estimates[1]! / ofTime,
          scaled.estimates[2]! / ofTime,
        ];
        close(back, plain.estimates, 1e-9);
      }),
      { seed: 1, numRuns: 30 },
    );
  });

  test("does not depend on the order of the rows or of the parameters", () => {
    const rows = fc.shuffledSubarray(periods, { minLength: periods.length });
    const places = fc.shuffledSubarray([0, 1, 2], { minLength: 3 });
    fc.assert(
      fc.property(rows, places, (order, place) => {
        const shuffled = leastSquares({
          residuals: (parameters) => {
            const named = Float64Array.from([0, 1, 2], (i) => parameters[place.indexOf(i)]!);
            const all = residuals(named);
            return order.map((row) => all[row]!);
          },
          start: place.map((i) => start[i]!),
        });
        close(
          shuffled.estimates,
          place.map((i) => plain.estimates[i]!),
          1e-9,
        );
        close(
          shuffled.standardErrors,
          place.map((i) => plain.standardErrors[i]),
          1e-8,
        );
      }),
      { seed: 2, numRuns: 20 },
    );
  });

  test("stays inside bounds and settles on the one that binds", () => {
    const bounded = leastSquares({ residuals, start, upper: [90, 20, 20], lower: [0, 0, 0.1] });
    expect(bounded.estimates[0]).toBe(90);
    expect(bounded.stop.kind).toBe("converged");
    // With the capacity held at its bound, the others are those of the problem in two parameters.
    const held = leastSquares({
      residuals: ([b, c]) => residuals(Float64Array.of(90, b!, c!)),
      start: [5, 3],
    });
    close(bounded.estimates.subarray(1), held.estimates, 1e-8);
  });

  test("leaves a bound again that binds only at the start", () => {
    const from = leastSquares({ residuals, start: [80, 0, 3], lower: [0, 0, 0], upper: [1e4, 20, 20] });
    close(from.estimates, plain.estimates, 1e-8);
  });

  test("says which parameters are not determined, and makes no number up for them", () => {
    const product = leastSquares({
      residuals: ([a, b, c]) => readings.map((reading, t) => reading - a! * b! * t - c!),
      start: [1, 2, 3],
    });
    expect(product.rank).toBe(2);
    expect(product.standardErrors.map((error) => error !== undefined)).toEqual([false, false, true]);
    expect(Number.isNaN(product.covariance[0])).toBe(true);
  });

  test("gives no standard errors when no residual is left over", () => {
    const exact = leastSquares({ residuals: ([a, b]) => [a! - 1, b! - 2], start: [0, 0] });
    close(exact.estimates, [1, 2], 1e-12);
    expect(exact.standardErrors).toEqual([undefined, undefined]);
  });

  test("walks round places where the model is not defined", () => {
    const root = leastSquares({
      residuals: ([a]) => readings.map((reading, t) => reading - Math.sqrt(a! * t + 100)),
      start: [5000],
    });
    expect(root.stop.kind).toBe("converged");
  });

  test("reports a start at which the model is not finite", () => {
    const broken = leastSquares({ residuals: ([a]) => [Math.log(a!), 1], start: [-1] });
    expect(broken.stop).toEqual({ kind: "failed", reason: "the model is not finite at the start" });
  });

  test.each([
    [{ residuals: () => [1], start: [1, 2] }, "too-few-residuals"],
    [{ residuals: () => [1, 2], start: [Number.NaN] }, "bad-start"],
    [{ residuals: () => [1, 2], start: [1], lower: [2], upper: [1] }, "bad-bounds"],
    [{ residuals: () => [1, 2], start: [1], lower: [2, 3] }, "other-number-of-parameters"],
    [{ residuals: () => [1, 2], start: [1], jacobian: () => [1] }, "jacobian-of-other-shape"],
  ])("refuses a problem that cannot be meant: %#", (problem, code) => {
    expect(() => leastSquares(problem)).toThrow(expect.objectContaining({ name: "ModelError", code }));
  });
});
