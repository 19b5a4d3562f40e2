import { describe, expect, test } from "vitest";
import { differences, observations, tableOf } from "../../src/record/index.js";

function weekly(week: number[], eggs: unknown[]) {
  return observations(tableOf({ week, eggs }), {
    period: "week",
    step: { every: 1, of: "week" },
    value: "eggs",
  });
}

describe("differences", () => {
  test("labels a pair across a gap with the steps it spans and does not spread its change", () => {
    const [series] = differences(weekly([1, 2, 4], [10, 12, 18])).series;
    expect(Array.from(series!.steps)).toEqual([1, 2]);
    expect(Array.from(series!.change)).toEqual([2, 6]);
    expect(Array.from(series!.ratio)).toEqual([1.2, 1.5]);
    expect(Array.from(series!.perHead)).toEqual([0.2, 0.5]);
  });

  test("forms a second difference only where three rows lie side by side", () => {
    const [series] = differences(weekly([1, 2, 3, 5, 6, 7], [1, 4, 9, 25, 36, 49]), { order: 2 }).series;
    expect(Array.from(series!.difference)).toEqual([2, 2]);
    expect(Array.from(series!.rows)).toEqual([3, 6]);
  });

  test("takes the seasonal difference to the season before", () => {
    const [series] = differences(weekly([1, 2, 3, 4, 5], [1, 5, 2, 7, 4]), { seasonal: 2 }).series;
    expect(Array.from(series!.difference)).toEqual([1, 2, 2]);
    expect(Array.from(series!.present)).toEqual([1, 5, 2]);
  });

  test("refuses the logarithm of a level of zero, naming its row", () => {
    expect(() => differences(weekly([1, 2, 3], [4, 0, 3]), { per: "log" })).toThrow(
      "Row 2, eggs: level 0 has no logarithm; choose censored, count model, or exclude.",
    );
  });

  test("leaves the ratio from zero empty and says so", () => {
    const changes = differences(weekly([1, 2, 3], [4, 0, 3]));
    expect(Array.from(changes.series[0]!.ratio)).toEqual([0, Number.NaN]);
    expect(changes.warnings.map(({ code }) => code)).toEqual(["no-ratio"]);
  });
});
