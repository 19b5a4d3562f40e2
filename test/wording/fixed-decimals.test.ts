import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { decimalsFor, fixedDecimals, minorUnits } from "../../kernel-helpers/wording/index.js";

describe("fixedDecimals", () => {
  // Source: arithmetic of the printed decimal, ties away from zero (common practice for money, "half-up").
  test.each([
    [1.005, 2, "1.01"],
    [2.675, 2, "2.68"],
    [1.035, 2, "1.04"],
    [-1.035, 2, "-1.04"],
    [102.5, 0, "103"],
    [0.5, 0, "1"],
    [1549, -2, "1500"],
    [1550, -2, "1600"],
    [1e21, 1, "1000000000000000000000.0"],
    [1.5e-9, 10, "0.0000000015"],
    [-0.001, 2, "0.00"],
    [0, 2, "0.00"],
  ])("rounds %d to %i decimals as %s", (value, decimals, text) => {
    expect(fixedDecimals(value, decimals)).toBe(text);
  });

  test("moves the decimal sign exactly when a share becomes per cent", () => {
    // In binary 0.285 * 100 is 28.499999999999996, which would print 28%.
    expect(fixedDecimals(0.285, 0, 2)).toBe("29");
  });

  test("agrees with whole-number arithmetic on every amount of cents", () => {
    fc.assert(
      fc.property(fc.integer({ min: -1e12, max: 1e12 }), (cents) => {
        const magnitude = String(Math.abs(cents)).padStart(3, "0");
        const expected = `${cents < 0 ? "-" : ""}${magnitude.slice(0, -2)}.${magnitude.slice(-2)}`;
        expect(fixedDecimals(cents / 100, 2)).toBe(expected);
        expect(minorUnits(BigInt(cents), 2)).toBe(expected);
      }),
      { seed: 3 },
    );
  });

  test("stays within half a unit of the last decimal", () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, min: -1e9, max: 1e9 }),
        fc.integer({ min: 0, max: 6 }),
        (value, digits) => {
          // One unit in the last place of 1e9 is 1.2e-7; the printed value is read back in binary.
          expect(Math.abs(Number(fixedDecimals(value, digits)) - value)).toBeLessThanOrEqual(
            0.5 * 10 ** -digits + 2.4e-7,
          );
        },
      ),
      { seed: 4 },
    );
  });
});

test("minor units have the decimals of the currency: none, two or three", () => {
  // Source: ISO 4217, minor units: JPY 0, EUR 2, KWD 3.
  expect(minorUnits(1293n, 0)).toBe("1293");
  expect(minorUnits(129346n, 2)).toBe("1293.46");
  expect(minorUnits(5n, 3)).toBe("0.005");
});

test("decimalsFor gives the requested significant digits, also when rounding up to the next power of ten", () => {
  expect(decimalsFor(0.0566, 2)).toBe(3);
  expect(decimalsFor(56.6, 2)).toBe(0);
  expect(decimalsFor(0.996, 2)).toBe(1);
});
