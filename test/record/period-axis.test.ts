import { describe, expect, test } from "vitest";
import {
  type CalendarName,
  indexOf,
  labelAt,
  labelsAt,
  observations,
  type PeriodAxis,
  periodsAfter,
  type StepLength,
  tableOf,
} from "../../src/record/index.js";

function axisOf(cells: readonly unknown[], step: StepLength | CalendarName): PeriodAxis {
  const table = tableOf({ at: cells, v: cells.map((_, i) => i + 1) });
  return observations(table, { period: "at", step, value: "v" }).axis;
}

const ahead = (
  cells: readonly unknown[],
  step: StepLength | CalendarName,
  count: number,
): readonly string[] =>
  labelsAt(
    axisOf(cells, step),
    Array.from({ length: count }, (_, i) => i),
  );

describe("labels of months", () => {
  // W3C, XML Schema Part 2: Datatypes (2004), appendix E: a day that the month does not have is its last one, and in
  // E.2 2000-03-31 + P1M = 2000-04-30.
  test("a day that a month does not have is its last one", () => {
    expect(ahead(["2000-03-31", "2000-04-30"], "month", 3)).toEqual([
      "2000-03-31",
      "2000-04-30",
      "2000-05-31",
    ]);
    expect(ahead(["2025-01-30"], "month", 3)).toEqual(["2025-01-30", "2025-02-28", "2025-03-30"]);
    expect(ahead(["2024-01-30", "2024-02-29"], "month", 3)).toEqual([
      "2024-01-30",
      "2024-02-29",
      "2024-03-30",
    ]);
  });

  // Common practice of loan dates, no source.
  test("the day is that of all rows, not of the first", () => {
    expect(ahead(["2025-02-28", "2025-03-28", "2025-04-28"], "month", 4)).toEqual([
      "2025-02-28",
      "2025-03-28",
      "2025-04-28",
      "2025-05-28",
    ]);
    expect(ahead(["2025-01-31", "2025-02-28", "2025-03-31"], "month", 4).at(-1)).toBe("2025-04-30");
    expect(ahead(["2025-02-28", "2025-03-30", "2025-04-30"], "month", 4)).toEqual([
      "2025-02-28",
      "2025-03-30",
      "2025-04-30",
      "2025-05-30",
    ]);
  });

  test("one date moved by a weekend does not move the others; dates on no common day are named by month", () => {
    expect(
      ahead(["2025-01-28", "2025-02-28", "2025-03-28", "2025-04-30", "2025-05-28"], "month", 7).at(-1),
    ).toBe("2025-07-28");
    expect(ahead(["2025-01-03", "2025-02-11", "2025-03-24"], "month", 4).at(-1)).toBe("2025-04");
  });

  test("each series keeps a day of its own", () => {
    const table = tableOf({
      loan: ["A", "A", "B", "B"],
      date: ["2025-01-31", "2025-02-28", "2025-02-15", "2025-03-15"],
      owed: [4, 3, 9, 8],
    });
    const { groups, axis } = observations(table, {
      period: "date",
      step: "month",
      by: "loan",
      value: "owed",
    });
    expect(groups.map((group) => labelAt(group.axis, 2))).toEqual(["2025-03-31", "2025-04-15"]);
    expect(periodsAfter(axis, groups[1]!.axis)).toBe(1);
  });
});

describe("labels of other calendars", () => {
  // ISO 8601: of 400 years 71 have a week 53; 2026 is one of them, 2027 is not.
  test("of ISO weeks hold week 53 where the year has one", () => {
    const axis = axisOf(["2026-W44", "2026-W45"], "iso-week");
    expect(labelsAt(axis, [8, 9, 10, 19])).toEqual(["2026-W52", "2026-W53", "2027-W01", "2027-W10"]);
    const cycle = axisOf(["2000-W01"], "iso-week");
    const weeks = Array.from({ length: 20_871 }, (_, i) => labelAt(cycle, i));
    expect(weeks.filter((label) => label.endsWith("W53"))).toHaveLength(71);
    expect(weeks.at(-1)).toBe("2399-W52");
  });

  // The Gregorian calendar: 97 leap years in 400, that is 146,097 days; 1900 and 2100 are none, 2000 is one.
  test("of days know which years are leap years", () => {
    expect(indexOf(axisOf(["2000-01-01"], "day"), "2400-01-01")).toBe(146_097);
    const ends = axisOf(["1900-01-31"], "month-end");
    expect(labelsAt(ends, [1, 1201, 2401])).toEqual(["1900-02-28", "2000-02-29", "2100-02-28"]);
  });

  test("of quarters, half hours, fiscal years and trading periods are written as the record writes them", () => {
    expect(ahead(["2025-Q3", "2025-Q4"], "quarter", 4)).toEqual(["2025-Q3", "2025-Q4", "2026-Q1", "2026-Q2"]);
    expect(ahead(["2025-03-31", "2025-06-30"], "quarter", 4).at(-1)).toBe("2025-12-31");
    expect(ahead(["2026-03-29 23:00", "2026-03-29 23:30"], "half-hour", 3).at(-1)).toBe("2026-03-30 00:00");
    expect(ahead(["1998/99"], "year", 3)).toEqual(["1998/99", "1999/00", "2000/01"]);
    expect(ahead(["FY2025", "FY2026"], "year", 3).at(-1)).toBe("FY2027");
    expect(ahead(["2025-P11"], "4-4-5", 3)).toEqual(["2025-P11", "2025-P12", "2026-P01"]);
    expect(ahead([2024, 2025], "year", 3)).toEqual(["2024", "2025", "2026"]);
    expect(ahead(["2001-06-14", "2002-05-30"], "survey-year", 3)).toEqual(["2001", "2002", "2003"]);
  });

  // The tax year of the United Kingdom runs from 6 April to 5 April (Income Tax Act 2007, section 4).
  test("of fiscal years say into which a date falls", () => {
    const step = { every: 1, of: "year", begins: "04-06" };
    const axis = axisOf(["2023-04-06", "2025-04-05", "2025-04-06"], step);
    expect(axis.form).toBe("year-pair");
    expect(labelsAt(axis, [0, 1, 2])).toEqual(["2023/24", "2024/25", "2025/26"]);
    expect(indexOf(axis, "2026-04-05")).toBe(2);
    expect(indexOf(axis, "2026-04-06")).toBe(3);
    expect(() => axisOf(["2025-04-06"], { every: 1, of: "year", begins: "31-04" })).toThrow(
      'Write step: { every: 1, of: "year", begins: "04-01" }.',
    );
  });

  test("of a year and a number are written as ISO 8601 or the trade writes them", () => {
    const pairs = (
      step: CalendarName,
      second: string,
      years: number[],
      numbers: number[],
    ): readonly string[] => {
      const table = tableOf({ year: years, [second]: numbers, v: years.map((_, i) => i) });
      const { axis, groups } = observations(table, { period: ["year", second], step, value: "v" });
      return [...(groups[0]!.labels ?? []), labelAt(axis, numbers.length)];
    };
    expect(pairs("iso-week", "week", [2020, 2020], [52, 53])).toEqual(["2020-W52", "2020-W53", "2021-W01"]);
    expect(pairs("month", "month", [2025, 2025], [11, 12])).toEqual(["2025-11", "2025-12", "2026-01"]);
    expect(pairs("4-4-5", "period", [2025], [12])).toEqual(["2025-P12", "2026-P01"]);
    expect(pairs("day", "day", [2024, 2024], [59, 60])).toEqual(["2024-02-28", "2024-02-29", "2024-03-01"]);
  });
});

describe("a label in other words", () => {
  test("names a period by any text that holds just one", () => {
    const monthly = axisOf(["2025-01-31", "2025-02-28"], "month-end");
    expect(["2027-06", "2027-06-30", "2027-06-12"].map((label) => indexOf(monthly, label))).toEqual([
      29, 29, 29,
    ]);
    expect(["2027", "2027-Q2", "next June", ""].map((label) => indexOf(monthly, label))).toEqual([
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
    const weekly = axisOf(["2026-10-26", "2026-11-02"], "week");
    expect([
      indexOf(weekly, "2026-W46"),
      indexOf(weekly, "2026-11-09"),
      indexOf(weekly, "2026-11-11"),
    ]).toEqual([2, 2, undefined]);
    const halfHours = axisOf(["2026-03-02 09:00", "2026-03-02 09:30"], "half-hour");
    expect([indexOf(halfHours, "2026-03-02T10:00Z"), indexOf(halfHours, "2026-03-02")]).toEqual([
      2,
      undefined,
    ]);
  });

  test("is the record's number where it counts in numbers", () => {
    const axis = axisOf([28, 29, 30], "month");
    expect([indexOf(axis, 41), indexOf(axis, "41"), indexOf(axis, 41.5), indexOf(axis, "2026-01")]).toEqual([
      13,
      13,
      undefined,
      undefined,
    ]);
    expect(indexOf(axisOf([24, 36], { every: 12, of: "hour" }), 60)).toBe(3);
  });
});

describe("a step", () => {
  const asked = (column: string, cells: readonly unknown[], step: StepLength) => () =>
    observations(tableOf({ [column]: cells, v: cells.map((_, i) => 2 ** i) }), {
      period: column,
      step,
      value: "v",
    });

  test("counts a known unit, or what the column is named after", () => {
    expect(asked("t", [0, 1], { every: 1, of: "months" })).toThrow(
      '"months" is not a unit of time. Did you mean "month"?',
    );
    expect(asked("t", [0, 1], { every: 1, of: "tide" })).toThrow("name the period column after it");
    expect(asked("tide", [0, 1], { every: 1, of: "tide" })().groups[0]!.index).toEqual(Int32Array.of(0, 1));
    expect(asked("t", [0, 1], { every: 1, of: "generation" })().axis.unit).toBe("generation");
  });

  test("that every pair spans several times is said, with what to write", () => {
    const { findings } = asked("time", [0, 900, 1800, 3600], { every: 15, of: "minute" })();
    const found = findings.find(({ kind }) => kind === "step-at-odds");
    expect(found!.message).toBe(
      "Every pair of rows spans 60 steps of 15 minutes, or a multiple of that: the step is probably not the one of the record. " +
        'If "time" counts seconds, write step: { every: 900, of: "second" }; if rows do lie 900 minutes apart, write step: { every: 900, of: "minute" }.',
    );
    // The advice works: 900 seconds are one step, and the pair that spans two stays a gap.
    const heeded = asked("time", [0, 900, 1800, 3600], { every: 900, of: "second" })();
    expect(heeded.groups[0]!.index).toEqual(Int32Array.of(0, 1, 2, 4));
  });
});
