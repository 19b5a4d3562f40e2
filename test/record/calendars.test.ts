import { describe, expect, test } from "vitest";
import { type ObservationOptions, observations, tableOf } from "../../src/record/index.js";

function indexes(columns: Record<string, unknown[]>, options: Omit<ObservationOptions, "value">): number[] {
  const [first] = Object.values(columns);
  const table = tableOf({ ...columns, level: first!.map((_, i) => i + 1) });
  return Array.from(observations(table, { ...options, value: "level" }).groups[0]!.index);
}

describe("a calendar", () => {
  test("of month ends counts 31 January, 29 February and 31 March one month apart", () => {
    const date = ["2024-01-31", "2024-02-29", "2024-03-31", "2024-04-30", "2024-06-30"];
    expect(indexes({ date }, { period: "date", step: "month-end" })).toEqual([0, 1, 2, 3, 5]);
  });

  test("of month ends tells a date that is none, and keeps it in its month", () => {
    const table = tableOf({ date: ["2024-01-31", "2024-02-28"], level: [1, 2] });
    const found = observations(table, { period: "date", step: "month-end", value: "level" });
    expect(Array.from(found.groups[0]!.index)).toEqual([0, 1]);
    expect(found.findings.map(({ kind, message }) => `${kind}: ${message}`)).toEqual([
      "not-month-end: Row 2: date 2024-02-28 is not the last day of its month.",
    ]);
  });

  test("of twenty-eight days is not one of months", () => {
    expect(
      indexes({ date: ["2026-01-01", "2026-01-29", "2026-02-26"] }, { period: "date", step: "28-day" }),
    ).toEqual([0, 1, 2]);
    expect(() => indexes({ date: ["2026-01-01", "2026-02-01"] }, { period: "date", step: "28-day" })).toThrow(
      "lies 1.10714 steps of 28 day",
    );
  });

  // ISO 8601: 2020 has a week 53 (28 December 2020 to 3 January 2021), 2021 has none.
  test("of ISO weeks knows week 53", () => {
    expect(
      indexes({ week: ["2020-W52", "2020-W53", "2021-W01"] }, { period: "week", step: "iso-week" }),
    ).toEqual([0, 1, 2]);
    expect(
      indexes(
        { date: ["2020-12-27", "2020-12-28", "2021-01-03", "2021-01-04"].slice(0, 2) },
        { period: "date", step: "iso-week" },
      ),
    ).toEqual([0, 1]);
    expect(
      indexes(
        { year: [2020, 2020, 2021], week: [52, 53, 1] },
        { period: ["year", "week"], step: "iso-week" },
      ),
    ).toEqual([0, 1, 2]);
    expect(() =>
      indexes({ year: [2021], week: [53] }, { period: ["year", "week"], step: "iso-week" }),
    ).toThrow("the year 2021 has no period 53");
    expect(() => indexes({ week: ["2021-W53"] }, { period: "week", step: "iso-week" })).toThrow(
      "ambiguous date",
    );
  });

  test("of 4-4-5 trading periods counts twelve a year", () => {
    expect(
      indexes(
        { year: [2025, 2025, 2026], period: [11, 12, 1] },
        { period: ["year", "period"], step: "4-4-5" },
      ),
    ).toEqual([0, 1, 2]);
    expect(() => indexes({ date: ["2025-01-01"] }, { period: "date", step: "4-4-5" })).toThrow(
      "a pair of columns",
    );
  });

  test("of 4-4-5 trading periods says of flows that they compare per week only", () => {
    const table = tableOf({ year: [2025, 2025], period: [1, 2], sold: [40, 38] });
    const found = observations(table, {
      period: ["year", "period"],
      step: "4-4-5",
      value: "sold",
      measured: "flow",
    }).findings;
    expect(found.map(({ kind }) => kind)).toEqual(["uneven-periods"]);
  });

  test("of half hours takes times of day", () => {
    expect(
      indexes(
        { at: ["2026-03-02 09:00", "2026-03-02 09:30", "2026-03-02T10:30"] },
        { period: "at", step: "half-hour" },
      ),
    ).toEqual([0, 1, 3]);
  });

  test("of survey years takes numbers and dates", () => {
    expect(indexes({ year: [2001, 2002, 2004] }, { period: "year", step: "survey-year" })).toEqual([0, 1, 3]);
    expect(
      indexes({ date: ["2001-06-14", "2002-05-30", "2004-07-02"] }, { period: "date", step: "survey-year" }),
    ).toEqual([0, 1, 3]);
  });

  test("of quarters and months takes their own writing", () => {
    expect(
      indexes({ quarter: ["2025-Q3", "2025-Q4", "2026-Q1"] }, { period: "quarter", step: "quarter" }),
    ).toEqual([0, 1, 2]);
    expect(
      indexes(
        { month: ["2025-11", "2025-12", "2026-02"] },
        { period: "month", step: { every: 1, of: "month" } },
      ),
    ).toEqual([0, 1, 3]);
    expect(
      indexes({ year: [2025, 2026], month: [12, 1] }, { period: ["year", "month"], step: "month" }),
    ).toEqual([0, 1]);
  });

  test("takes Date values as it takes ISO text", () => {
    const date = [new Date("2026-03-01T00:00:00Z"), new Date("2026-03-02T00:00:00Z")];
    expect(indexes({ date }, { period: "date", step: "day" })).toEqual([0, 1]);
  });

  test("that does not exist is refused with those that do", () => {
    expect(() => indexes({ week: [1] }, { period: "week", step: "fortnight" as never })).toThrow(
      'The option "step" is "fortnight"; it must be a length such as { every: 12, of: "hour" } or one of second, minute, half-hour, hour,',
    );
  });

  test("refuses a day that does not exist", () => {
    expect(() => indexes({ date: ["2025-02-29"] }, { period: "date", step: "day" })).toThrow(
      '"2025-02-29" - ambiguous date',
    );
  });
});
