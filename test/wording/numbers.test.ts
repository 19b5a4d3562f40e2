import { afterEach, expect, test } from "vitest";
import { interval, numberFormat, percent, pValue } from "../../kernel-helpers/wording/index.js";

afterEach(() => void numberFormat("standard"));

// Source: arithmetic of the printed decimal; that a share which is not 0 or 1 is never written as 0% or 100% is
// common practice, no source.
test.each([
  [0.954, 0, "95%"],
  [0.285, 0, "29%"],
  [0.0004, 0, "<1%"],
  [0.0004, 1, "<0.1%"],
  [0.9996, 0, ">99%"],
  [0.9996, 1, ">99.9%"],
  [0, 1, "0.0%"],
  [1, 0, "100%"],
  [-0.031, 1, "-3.1%"],
  [1.2, 0, "120%"],
])("a share of %d with %i decimals is %s", (share, decimals, text) => {
  expect(percent(share, decimals)).toBe(text);
});

test("a level is written with the digits that were typed", () => {
  expect([0.95, 0.975, 0.9, 0.999, 0.07].map((level) => percent(level))).toEqual([
    "95%",
    "97.5%",
    "90%",
    "99.9%",
    "7%",
  ]);
});

test("a missing share is not written as a percentage", () => {
  expect(percent(Number.NaN)).toBe("not available");
});

// Source: American Psychological Association (2020), Publication Manual, 7th edition, 6.36: exact p to two or three
// decimals, "< .001" below (here with the leading zero that ISO 80000-1 asks for).
test.each([
  [0.0312, "p = 0.03"],
  [0.4, "p = 0.40"],
  [0.0042, "p = 0.004"],
  [0.00004, "p < 0.001"],
  [0.9994, "p > 0.99"],
])("a p-value of %d is written %s", (p, text) => {
  expect(pValue(p)).toBe(text);
});

test("decimal signs follow the number format in force", () => {
  numberFormat({ decimal: "," });
  expect([percent(0.975), percent(0.1234, 1), pValue(0.031)]).toEqual(["97,5%", "12,3%", "p = 0,03"]);
});

test("an interval shows the limits that it has", () => {
  expect(interval("0.39", "0.47", "per month")).toBe("0.39 to 0.47 per month");
  expect(interval("39", undefined)).toBe("at least 39");
  expect(interval(undefined, "47", "EUR")).toBe("at most 47 EUR");
  expect(interval(undefined, undefined)).toBe("without limit on either side");
});
