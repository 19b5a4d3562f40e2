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

test("takes an end that is a root, and infinite values elsewhere", () => {
  expect(findRoot((x) => x - 1, 1, 3)).toBe(1);
  expect(findRoot((x) => (x > 1.5 ? Number.POSITIVE_INFINITY : x - 1), 0, 3)).toBeCloseTo(1, 12);
});

test("refuses ends with the same sign", () => {
  expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The function is 2 at -1 and 2 at 1, so no root is enclosed between them. Give two places where its signs differ.]`,
  );
});
