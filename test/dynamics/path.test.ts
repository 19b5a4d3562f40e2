import { expect, test } from "vitest";
import { trajectory } from "../../src/dynamics/index.js";
import { recurrence, rules } from "../../src/rule/index.js";

test("quantities are reported in the row that their period ends at", () => {
  const rule = recurrence("interest = i*owed\npaid = min(p, owed + interest)\nΔowed = interest - paid");
  const run = trajectory(rule, { parameters: { i: 0.1, p: 50 }, initial: { owed: 100 }, periods: 3 });
  expect([...run.values["owed"]!]).toEqual([100, 60, 16, expect.closeTo(0, 12)]);
  expect([...run.quantities["interest"]!]).toEqual([Number.NaN, 10, 6, expect.closeTo(1.6, 12)]);
  expect([...run.quantities["paid"]!]).toEqual([Number.NaN, 50, 50, expect.closeTo(17.6, 12)]);
});

test("a path that leaves the finite range ends before it, with the period and the reason", () => {
  const rule = recurrence("N[t+1] = log(N) - c");
  const { stop, values } = trajectory(rule, { parameters: { c: 1 }, initial: { N: 3 }, periods: 10 });
  expect(values["N"]).toHaveLength(3);
  expect(stop).toMatchInlineSnapshot(`
    {
      "kind": "left-finite-range",
      "period": 3,
      "reason": "The rule leaves the finite range at period 3: log(-3.31656) is undefined.",
    }
  `);
});

test("a division by an input that is zero is named with its period", () => {
  const rule = recurrence("N[t+1] = N + 1/u", { inputs: ["u"] });
  const { stop } = trajectory(rule, { initial: { N: 3 }, inputs: { u: [1, 2, 0, 4] }, periods: 4 });
  expect(stop).toMatchInlineSnapshot(`
    {
      "kind": "left-finite-range",
      "period": 3,
      "reason": "The rule leaves the finite range at period 3: 1/u divides 1 by zero.",
    }
  `);
});

// Source: the catch table of the quadratic rule with r 0.5, K 1000 from 500: years to the first level at or below 0
// are never, 69, 30 and 12 for catches 125, 126, 130 and 150; exact counts.
test.each([
  [125, undefined],
  [126, 69],
  [130, 30],
  [150, 12],
])("a catch of %d from 500 ends the stock in year %s", (C, year) => {
  const rule = recurrence("ΔN = r*N*(1 - N/K) - C", { bounds: { N: [0, Number.POSITIVE_INFINITY] } });
  const run = trajectory(rule, { parameters: { r: 0.5, K: 1000, C }, initial: { N: 500 }, periods: 200 });
  expect(run.absorbed[0]?.period).toBe(year);
  expect(run.stop.kind).toBe("complete");
  expect(run.values["N"]!.at(-1)).toBe(year === undefined ? 500 : 0);
});

test("a bound that is an error of the rule ends the path with the value beyond it", () => {
  const rule = recurrence("ΔN = r*N*(1 - N/K) - C", {
    bounds: { N: { range: [0, Number.POSITIVE_INFINITY], atBounds: "error" } },
  });
  const run = trajectory(rule, {
    parameters: { r: 0.5, K: 1000, C: 150 },
    initial: { N: 500 },
    periods: 200,
  });
  expect(run.stop.kind === "left-bounds" ? run.stop.period : undefined).toBe(12);
  expect(run.values["N"]!.at(-1)).toBeLessThan(0);
  expect(run.absorbed).toEqual([]);
});

test("an initial value beyond the bounds of its state is refused", () => {
  const rule = recurrence("B[t+1] = B - C", { bounds: { B: [0, Number.POSITIVE_INFINITY] } });
  expect(() =>
    trajectory(rule, { parameters: { C: 1 }, initial: { B: -5 }, periods: 3 }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The initial value of "B" is -5, and the rule bounds B to 0 to Infinity. Give an \`initial\` within them, or the rule other \`bounds\`.]`,
  );
});

test("a named rule is not run outside its range", () => {
  expect(() =>
    trajectory(rules.logistic(), { parameters: { r: 2.5, K: 100 }, initial: { N: 150 }, periods: 3 }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: Discrete logistic (quadratic map) means what it says only where N0 >= 0 and N0 <= K*(1 + 1/r); given were N0 = 150, K = 100, r = 2.5. Choose values inside the range, or write the rule out with recurrence to run it regardless.]`,
  );
});

test("inputs must reach as far as the path, and at [t+1] one further", () => {
  const rule = recurrence("owed[t+1] = owed - paid[t+1]", { inputs: ["paid"] });
  const run = trajectory(rule, { initial: { owed: 10 }, inputs: { paid: [0, 1, 2, 3] }, periods: 3 });
  expect([...run.values["owed"]!]).toEqual([10, 9, 7, 4]);
  expect(() =>
    trajectory(rule, { initial: { owed: 10 }, inputs: { paid: [0, 1, 2, 3] }, periods: 4 }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: Invalid plan for \`paid\`: it has 4 values and the projection needs 5. Give one for each period, or { usual, from, at }.]`,
  );
});

test("a rule with lags needs its history, oldest first", () => {
  const rule = recurrence("F[t+1] = F + F[t-2]");
  const run = trajectory(rule, { initial: { F: [1, 2, 3] }, periods: 4 });
  expect([...run.values["F"]!]).toEqual([3, 4, 6, 9, 13]);
  expect(() => trajectory(rule, { initial: { F: 1 }, periods: 4 })).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The rule reads "F" up to 2 periods back, so it needs 3 first values, oldest first; 1 were given. Give initial: { F: [ ... ] } with 3 numbers.]`,
  );
});

test("missing and strange parameters are refused by name", () => {
  const rule = rules.bevertonHolt();
  expect(() =>
    trajectory(rule, { parameters: { R: 2 }, initial: { N: 1 }, periods: 1 }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The rule needs a value for the parameter "K", and none was given. Given: R.]`,
  );
  expect(() =>
    trajectory(rule, { parameters: { R: 2, K: 1, k: 3 }, initial: { N: 1 }, periods: 1 }),
  ).toThrowErrorMatchingInlineSnapshot(
    `[ModelError: The rule has no parameter called "k". It has: R, K. Did you mean "K" or "R"?]`,
  );
});
