import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { logGamma, minimise, secondDerivatives } from "../../src/numeric/index.js";

type Point = ArrayLike<number> & Iterable<number>;

// Source: Rosenbrock (1960), The Computer Journal 3:175: least value 0 at (1, 1), from the start (-1.2, 1).
const valley = ([x, y]: Point): number => 100 * (y! - x! * x!) ** 2 + (1 - x!) ** 2;

describe("minimise", () => {
  test("follows a curved valley to its lowest point", () => {
    const { estimates, value, stop, evaluations } = minimise(valley, Float64Array.of(-1.2, 1));
    expect(stop).toEqual({ kind: "converged", test: "gradient" });
    estimates.forEach((each) => {
      expect(Math.abs(each - 1)).toBeLessThan(1e-5);
    });
    expect(value).toBe(valley(estimates));
    // SciPy 1.17.1 needs 31 iterations of the same method; a gradient takes 4 evaluations and a step a few more.
    expect(evaluations).toBeLessThan(31 * 8);
  });

  test("finds the lowest point of a quadratic on either side of a bound", () => {
    const place = fc.double({ min: -5, max: 5, noNaN: true });
    fc.assert(
      fc.property(
        place,
        place,
        fc.double({ min: 0.1, max: 0.9, noNaN: true }),
        fc.boolean(),
        (a, b, tilt, turned) => {
          const sign = turned ? -1 : 1;
          const bowl = ([x, y]: Point): number =>
            (sign * x! - a) ** 2 + 2 * tilt * (sign * x! - a) * (y! - b) + (y! - b) ** 2;
          const open = Float64Array.of(sign > 0 ? 0 : -99, -10);
          const bounds = sign > 0 ? { lower: open } : { lower: open, upper: Float64Array.of(0, 99) };
          const { estimates } = minimise(bowl, Float64Array.of(6 * sign, 3), bounds);
          // By hand: with x held at 0 the best y is b + tilt a; otherwise the bowl's own lowest point.
          const [x, y] = a >= 0 ? [a, b] : [0, b + tilt * a];
          expect(Math.abs(sign * estimates[0]! - x)).toBeLessThan(1e-4);
          expect(Math.abs(estimates[1]! - y)).toBeLessThan(1e-4);
        },
      ),
      { seed: 6, numRuns: 60 },
    );
  });

  test("holds an argument whose bounds are equal, and moves a start inside the bounds", () => {
    const { estimates } = minimise(valley, Float64Array.of(0.7, 100), {
      lower: Float64Array.of(0.5, -10),
      upper: Float64Array.of(0.5, 10),
    });
    expect(estimates[0]).toBe(0.5);
    expect(Math.abs(estimates[1]! - 0.25)).toBeLessThan(1e-6);
  });

  // By hand: x - ln x is lowest at 1; the function does not exist at and below 0, nor above 20.
  test("walks round what is not finite, on either side", () => {
    const one = ([x]: Point): number => (x! > 20 ? Number.NaN : x! - Math.log(x!));
    for (const start of [5, 1e-7, 1e-10, 19.9999999]) {
      const { estimates, stop } = minimise(one, Float64Array.of(start));
      expect(Math.abs(estimates[0]! - 1)).toBeLessThan(1e-5);
      expect(stop.kind).toBe("converged");
    }
    const nowhere = minimise(() => Number.NaN, Float64Array.of(1));
    expect(nowhere.stop).toEqual({ kind: "failed", reason: "the function is not finite at the start" });
    expect(nowhere.estimates[0]).toBe(1);
    expect(nowhere.evaluations).toBe(1);
  });

  test("stops at the limit of iterations and says so", () => {
    const { stop, value } = minimise(valley, Float64Array.of(-1.2, 1), { iterationLimit: 3 });
    expect(stop).toEqual({ kind: "iteration-limit" });
    expect(value).toBeLessThan(valley([-1.2, 1]));
  });

  test("ends where no step lowers the function any more", () => {
    const { estimates, stop } = minimise(([x]) => Math.max(x! - 3, 6 - 2 * x!), Float64Array.of(10));
    expect(stop).toEqual({ kind: "converged", test: "reduction" });
    expect(Math.abs(estimates[0]! - 3)).toBeLessThan(1e-4);
  });

  // Each argument is a million times the other; the lowest point is (2e6, 3e-6), where the value is 1.
  test("copes with arguments of unlike sizes", () => {
    const bowl = ([x, y]: Point): number => (x! / 1e6 - 2) ** 2 + (y! * 1e6 - 3) ** 2 + 1;
    const { estimates } = minimise(bowl, Float64Array.of(1e6, 1e-6));
    expect(estimates[0]! / 2e6).toBeCloseTo(1, 5);
    expect(estimates[1]! / 3e-6).toBeCloseTo(1, 5);
    const fromZero = minimise(([x]) => (x! - 3e-9) ** 2 * 1e18, Float64Array.of(0), {
      scale: Float64Array.of(1e-9),
    });
    expect(fromZero.estimates[0]! / 3e-9).toBeCloseTo(1, 4);
  });

  // A quadratic with second derivatives [[4, 1, 2], [1, 3, 0], [2, 0, 5]] and lowest point (1, -2, 3). Its inverse, over
  // 43, leads there in one step; with the first argument held at 2 the lowest point is (2, -7/3, 13/5).
  test("uses a known inverse of the second derivatives, also where an argument is at its bound", () => {
    const bowl = ([x, y, z]: Point): number => {
      const [a, b, c] = [x! - 1, y! + 2, z! - 3];
      return 2 * a * a + 1.5 * b * b + 2.5 * c * c + a * b + 2 * a * c;
    };
    const inverse = Float64Array.of(15, -5, -6, -5, 16, 2, -6, 2, 11).map((value) => value / 43);
    const known = minimise(bowl, Float64Array.of(9, 9, 9), { inverse });
    const unknown = minimise(bowl, Float64Array.of(9, 9, 9));
    [1, -2, 3].forEach((value, i) => {
      expect(known.estimates[i]).toBeCloseTo(value, 6);
      expect(unknown.estimates[i]).toBeCloseTo(value, 5);
    });
    expect(known.evaluations).toBeLessThan(20);
    expect(known.evaluations).toBeLessThan(unknown.evaluations);
    const bounded = minimise(bowl, Float64Array.of(2, 9, 9), {
      inverse,
      lower: Float64Array.of(2, -99, -99),
    });
    [2, -7 / 3, 13 / 5].forEach((value, i) => {
      expect(bounded.estimates[i]).toBeCloseTo(value, 6);
    });
    expect(bounded.evaluations).toBeLessThan(20);
    const broken = inverse.map((value, k) => (k === 4 ? Number.NaN : value));
    expect(minimise(bowl, Float64Array.of(9, 9, 9), { inverse: broken }).estimates[1]).toBeCloseTo(-2, 5);
  });
});

describe("second derivatives", () => {
  test("at the bottom of the valley are those worked out by hand", () => {
    // f_xx = 802, f_xy = -400, f_yy = 200 at (1, 1); one extrapolation leaves about six digits.
    const at = Float64Array.of(1, 1);
    const found = secondDerivatives(valley, at);
    [802, -400, -400, 200].forEach((value, k) => {
      expect(Math.abs(found[k]! / value - 1)).toBeLessThan(1e-5);
    });
    expect([...at]).toEqual([1, 1]);
  });

  // By hand: -ln of a normal likelihood in mean and ln sd of n values has [[n/s^2, 0], [0, 2n]] at its maximum.
  test("of a likelihood are its information, in any unit and from steps of any first size", () => {
    for (const unit of [1e-7, 1, 1e6]) {
      const values = [3, 5, 4, 8, 6, 4].map((value) => value * unit);
      const mean = 5 * unit;
      const sd = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / 6);
      const deviance = ([m, log]: Point): number =>
        values.reduce((sum, value) => sum + ((value - m!) / Math.exp(log!)) ** 2, 0) + 12 * log!;
      const found = secondDerivatives(deviance, Float64Array.of(mean, Math.log(sd)));
      expect((found[0]! * sd * sd) / 12).toBeCloseTo(1, 5);
      expect(found[3]! / 24).toBeCloseTo(1, 5);
      expect(Math.abs(found[1]!) * sd).toBeLessThan(1e-4);
      expect(found[2]).toBe(found[1]);
    }
  });

  test("are found at 0, of three arguments, and inside the range where the function exists", () => {
    const bowl = ([x, y, z]: Point): number =>
      2 * x! * x! + 1.5e-6 * y! * y! + 2.5 * z! * z! + x! * y! * 1e-3 + 2 * x! * z! - y! * z! * 2e-3;
    const expected = [4, 1e-3, 2, 1e-3, 3e-6, -2e-3, 2, -2e-3, 5];
    secondDerivatives(bowl, new Float64Array(3)).forEach((value, k) => {
      const [i, j] = [Math.floor(k / 3), k % 3];
      const size = Math.sqrt(expected[4 * i]! * expected[4 * j]!);
      expect(Math.abs(value - expected[k]!) / size).toBeLessThan(1e-6);
    });
    // -ln x + x has the second derivative 1 at 1 and does not exist below 0; with so wide a rise the first step leaves it.
    const found = secondDerivatives(([x]) => x! - Math.log(x!), Float64Array.of(1), 1e-4);
    expect(found[0]).toBeCloseTo(1, 5);
  });

  test("are taken over steps along which the function rises as asked", () => {
    const reached: number[] = [];
    secondDerivatives(
      ([x]) => {
        const value = 5e8 * x! * x!;
        reached.push(value);
        return value;
      },
      new Float64Array(1),
      0.02,
    );
    expect(Math.max(...reached.slice(-4))).toBeLessThan(0.06);
    expect(Math.max(...reached.slice(-4))).toBeGreaterThan(0.006);
    // Of a parabola the second try is right: 1 value, 2 tries of 2, and 2 differences of 2.
    expect(reached.length).toBeLessThan(16);
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
