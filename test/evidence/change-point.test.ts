import { describe, expect, test } from "vitest";
import { changePoint } from "../../src/evidence/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { series } from "./series.js";

const crowding = recurrence("N[t+1] = N*exp(r*(1 - N/K))");
const onLog = { distribution: "lognormal" } as const;

/** Steps of the crowding rule with lognormal errors of 10%, K going from 100 to `after` in period 22. */
function stepped(after: number, seed: number): number[] {
  const stream = randomStream(seed);
  const values = [20];
  for (let t = 1; t < 40; t++) {
    const level = values[t - 1]!;
    const capacity = t >= 22 ? after : 100;
    values.push(level * Math.exp(0.5 * (1 - level / capacity) + 0.1 * stream.normal()));
  }
  return values;
}

describe("changePoint", () => {
  test("dates a change of a parameter, and tells both sets of parameters", () => {
    const [found] = changePoint(crowding, series(stepped(55, 3)), onLog).groups;
    expect(found!.found).toBe(true);
    expect(found!.earliest).toBeLessThanOrEqual(22);
    expect(found!.latest).toBeGreaterThanOrEqual(22);
    expect(found!.before.parameters["K"]!).toBeGreaterThan(85);
    expect(found!.after.parameters["K"]!).toBeLessThan(70);
    expect(found!.sentence).toMatch(
      /^The rule changed from period \d+ on \(95% interval .*Project with the parameters after it only\.$/,
    );
  });

  // Source: the level of the test; 120 records, four binomial errors of 5% are 8 points. Over 5,000 in the benchmark.
  test("calls a break in 5% of records without one", () => {
    let alarms = 0;
    for (let k = 0; k < 120; k++)
      if (
        changePoint(crowding, series(stepped(100, k)), { ...onLog, resamples: 99, seed: k }).groups[0]!.found
      )
        alarms++;
    expect(Math.abs(alarms / 120 - 0.05)).toBeLessThan(0.08);
  });

  test("its interval holds the date in 90% of records with a break", () => {
    let inside = 0;
    for (let k = 0; k < 60; k++) {
      const [found] = changePoint(crowding, series(stepped(60, k)), { ...onLog, resamples: 99 }).groups;
      if (found!.earliest <= 22 && 22 <= found!.latest) inside++;
    }
    expect(inside).toBeGreaterThanOrEqual(54);
  });

  // Source: the definition of F by regressions before and after each date, worked out here in closed form.
  test("the largest F of a mean that changes is the one of all two-part means", () => {
    const values = [3.1, 2.7, 3.4, 2.9, 3.3, 2.8, 4.4, 4.9, 4.2, 4.7, 4.5, 4.1];
    const rule = recurrence("N[t+1] = c");
    const [found] = changePoint(rule, series(values), { resamples: 99 }).groups;
    const squares = (part: readonly number[]): number => {
      const mean = part.reduce((sum, value) => sum + value, 0) / part.length;
      return part.reduce((sum, value) => sum + (value - mean) ** 2, 0);
    };
    const compared = values.slice(1);
    const two = Math.min(
      ...[3, 4, 5, 6, 7, 8].map((k) => squares(compared.slice(0, k)) + squares(compared.slice(k))),
    );
    expect(found!.statistic).toBeCloseTo(((squares(compared) - two) / two) * (compared.length - 2), 9);
    expect(found!.date).toBe(6);
  });

  test("refuses a record too short to be parted", () => {
    expect(() => changePoint(crowding, series([1, 2, 3, 5, 6, 7]), onLog)).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: 5 steps leave no date with enough of them on either side to fit the rule twice. Use a rule with fewer parameters, hold some with { fixed }, or wait for more rows.]`,
    );
  });
});
