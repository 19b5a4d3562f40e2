import fc from "fast-check";
import { expect, test } from "vitest";
import { findRoot } from "../../src/numeric/index.js";

test("finds a square root to the last digits", () => {
  expect(Math.abs(findRoot((x) => x * x - 2, 0, 2) - Math.SQRT2)).toBeLessThanOrEqual(2 ** -51);
});

test("finds the root of a cubic anywhere between its ends, whichever is given first", () => {
  fc.assert(
    fc.property(fc.double({ min: -50, max: 50, noNaN: true }), fc.boolean(), (root, turned) => {
      const cubic = (x: number): number => (x - root) ** 3 + (x - root);
      const found = turned ? findRoot(cubic, 60, -60) : findRoot(cubic, -60, 60);
      expect(Math.abs(found - root)).toBeLessThan(1e-13 * (1 + Math.abs(root)));
    }),
    { seed: 3 },
  );
});

// Source: roots and evaluations of another program's Brent's method (SciPy 1.17.1, brentq to the rounding of the root);
// the first is the example of Wallis (1685). Without interpolation each would take more than 50.
test.each<[string, (x: number) => number, number, number, number, number]>([
  ["x^3 - 2x - 5", (x) => x ** 3 - 2 * x - 5, 2, 3, 2.0945514815423265, 8],
  ["cos x - x", (x) => Math.cos(x) - x, 0, 1, 0.7390851332151607, 8],
  ["e^x - 5", (x) => Math.exp(x) - 5, -2, 4, 1.6094379124341003, 12],
  ["x^9 - 1/2", (x) => x ** 9 - 0.5, 0, 2, 0.9258747122872903, 14],
  ["x e^-x - 0.01", (x) => x * Math.exp(-x) - 0.01, 1, 20, 6.472775124394005, 14],
  ["a small arc tangent", (x) => Math.atan(x - 1) * 1e-6, -30, 100, 1, 12],
  ["a logarithm", (x) => Math.log(x) - 1e-3, 1e-6, 1e3, 1.0010005001667084, 20],
])("finds the root of %s in as many evaluations as another program", (_, of, from, to, root, evaluations) => {
  let count = 0;
  const found = findRoot(
    (x) => {
      count++;
      return of(x);
    },
    from,
    to,
  );
  expect(Math.abs(found - root)).toBeLessThanOrEqual(4 * Number.EPSILON * root);
  expect(count).toBeLessThanOrEqual(evaluations + 1);
});

test("stops at the tolerance asked for, or at the limit of iterations", () => {
  const count = (tolerance: number, iterationLimit?: number): readonly [number, number] => {
    let calls = 0;
    const of = (x: number): number => {
      calls++;
      return x ** 3 - 2 * x - 5;
    };
    const limits = iterationLimit === undefined ? { tolerance } : { tolerance, iterationLimit };
    return [findRoot(of, 2, 3, limits), calls];
  };
  const [rough, few] = count(1e-2);
  expect(Math.abs(rough - 2.0945514815423265)).toBeLessThan(1e-2);
  expect(few).toBeLessThan(count(0)[1]);
  // Two evaluations of the ends, then one an iteration.
  expect(count(0, 3)[1]).toBe(5);
});

test("takes an end that is a root, and infinite values elsewhere", () => {
  expect(findRoot((x) => x - 1, 1, 3)).toBe(1);
  expect(findRoot((x) => x - 3, 1, 3)).toBe(3);
  expect(findRoot((x) => (x > 1.5 ? Number.POSITIVE_INFINITY : x - 1), 0, 3)).toBeCloseTo(1, 12);
});

// The product of two values of 1e-200 underflows to 0, with or without a change of sign.
test("tells signs of values however small", () => {
  expect(findRoot((x) => 1e-200 * (x - 0.3), 0, 1)).toBeCloseTo(0.3, 12);
  expect(findRoot((x) => 1e200 * (x - 0.3), 0, 1)).toBeCloseTo(0.3, 12);
  expect(() => findRoot((x) => 1e-200 * (x + 0.3), 0, 1)).toThrow(
    expect.objectContaining({ code: "no-sign-change" }),
  );
});

test("refuses ends with the same sign, and values that are no numbers", () => {
  expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The function is 2 at -1 and 2 at 1, so no root is enclosed between them. Give two places where its signs differ.]`,
  );
  expect(() => findRoot(() => Number.NaN, -1, 1)).toThrow(
    expect.objectContaining({
      code: "no-sign-change",
      facts: { from: -1, to: 1, atFrom: Number.NaN, atTo: Number.NaN },
    }),
  );
});
