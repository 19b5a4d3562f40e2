import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { logGamma, minimise, secondDerivatives } from "../../src/numeric/index.js";

// Source: Rosenbrock (1960), The Computer Journal 3:175: least value 0 at (1, 1), from the start (-1.2, 1).
const valley = ([x, y]: ArrayLike<number> & Iterable<number>): number =>
  100 * (y! - x! * x!) ** 2 + (1 - x!) ** 2;

describe("minimise", () => {
  test("follows a curved valley to its lowest point", () => {
    const { estimates, stop } = minimise(valley, Float64Array.of(-1.2, 1));
    expect(stop.kind).toBe("converged");
    estimates.forEach((value) => {
      expect(Math.abs(value - 1)).toBeLessThan(1e-5);
    });
  });

  test("finds the lowest point of a quadratic on either side of a bound", () => {
    const place = fc.double({ min: -5, max: 5, noNaN: true });
    fc.assert(
      fc.property(place, place, fc.double({ min: 0.1, max: 0.9, noNaN: true }), (a, b, tilt) => {
        const bowl = ([x, y]: ArrayLike<number> & Iterable<number>): number =>
          (x! - a) ** 2 + 2 * tilt * (x! - a) * (y! - b) + (y! - b) ** 2;
        const { estimates } = minimise(bowl, Float64Array.of(6, 3), { lower: Float64Array.of(0, -10) });
        // By hand: with x held at 0 the best y is b + tilt a; otherwise the bowl's own lowest point.
        const [x, y] = a >= 0 ? [a, b] : [0, b + tilt * a];
        expect(Math.abs(estimates[0]! - x)).toBeLessThan(1e-4);
        expect(Math.abs(estimates[1]! - y)).toBeLessThan(1e-4);
      }),
      { seed: 6, numRuns: 60 },
    );
  });

  test("holds an argument whose bounds are equal, and walks round what is not finite", () => {
    const held = Float64Array.of(0.5, -10);
    const { estimates } = minimise(valley, Float64Array.of(0.5, 1), {
      lower: held,
      upper: Float64Array.of(0.5, 10),
    });
    expect(estimates[0]).toBe(0.5);
    expect(Math.abs(estimates[1]! - 0.25)).toBeLessThan(1e-6);
    const log = minimise(([x]) => x! - Math.log(x!), Float64Array.of(5));
    expect(Math.abs(log.estimates[0]! - 1)).toBeLessThan(1e-5);
    expect(minimise(() => Number.NaN, Float64Array.of(1)).stop.kind).toBe("failed");
  });
});

test("second derivatives at the bottom of the valley are those worked out by hand", () => {
  // f_xx = 802, f_xy = -400, f_yy = 200 at (1, 1); one extrapolation leaves about six digits.
  const bends = secondDerivatives(valley, Float64Array.of(1, 1));
  [802, -400, -400, 200].forEach((value, k) => {
    expect(Math.abs(bends[k]! / value - 1)).toBeLessThan(1e-5);
  });
});

test("the logarithm of the gamma function is that of factorials, and of root pi at a half", () => {
  let factorial = 1;
  for (let n = 1; n <= 20; n++) {
    expect(Math.abs(logGamma(n) - Math.log(factorial))).toBeLessThan(
      1e-13 * Math.max(1, Math.log(factorial)),
    );
    factorial *= n;
  }
  expect(Math.abs(logGamma(0.5) - 0.5 * Math.log(Math.PI))).toBeLessThan(1e-14);
});
