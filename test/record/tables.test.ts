import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  type ColumnTable,
  filled,
  longer,
  shifted,
  tableOf,
  toPeriods,
  wider,
  windowed,
} from "../../src/record/index.js";

const weeks = { period: "week", step: "week" } as const;
const gapped = tableOf({ week: [1, 2, 4, 5], sold: [4, 6, 10, null] });

const last = (table: ColumnTable): unknown[] => Array.from(table.columns.at(-1)!);

describe("a shift", () => {
  test("goes by periods, not rows: behind a gap nothing is known", () => {
    const made = shifted(gapped, { ...weeks, column: "sold" });
    expect(made.names.at(-1)).toBe("sold, 1 before");
    expect(last(made)).toEqual([Number.NaN, 4, Number.NaN, 10]);
    expect(last(shifted(gapped, { ...weeks, column: "sold", steps: -2 }))).toEqual([
      Number.NaN,
      10,
      Number.NaN,
      Number.NaN,
    ]);
    expect(last(shifted(gapped, { ...weeks, column: "sold", steps: 2, name: "earlier" }))).toEqual([
      Number.NaN,
      Number.NaN,
      6,
      Number.NaN,
    ]);
  });

  test("stays inside its series and keeps the order of the rows", () => {
    const table = tableOf({ item: ["a", "b", "a", "b"], week: [1, 1, 2, 2], sold: [1, 2, 3, 4] });
    expect(last(shifted(table, { ...weeks, by: "item", column: "sold" }))).toEqual([
      Number.NaN,
      Number.NaN,
      1,
      2,
    ]);
  });

  test("refuses doubled periods and a name that is taken", () => {
    expect(() => shifted(tableOf({ week: [1, 1], sold: [1, 2] }), { ...weeks, column: "sold" })).toThrow(
      "week 1 appears 2 times",
    );
    expect(() => shifted(gapped, { ...weeks, column: "sold", name: "week" })).toThrow(
      "a name that no column of the record has",
    );
  });

  // Property: what is shifted back and ahead again is where it was, wherever both rows are there.
  test("back and ahead gives the value itself, or nothing", () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.integer({ min: 0, max: 40 }), { minLength: 1, maxLength: 20 }),
        fc.integer({ min: -5, max: 5 }),
        (at, steps) => {
          const week = [...at].sort((a, b) => a - b);
          const table = tableOf({ week, sold: week.map((w) => w * w) });
          const once = shifted(table, { ...weeks, column: "sold", steps, name: "moved" });
          const back = last(shifted(once, { ...weeks, column: "moved", steps: -steps, name: "back" }));
          back.forEach((value, i) => {
            if (!Number.isNaN(value)) expect(value).toBe(week[i]! ** 2);
          });
        },
      ),
      { seed: 20260401, numRuns: 60 },
    );
  });
});

describe("a window", () => {
  test("has a value only where every period of it is recorded, unless fewer are said to do", () => {
    expect(last(windowed(gapped, { ...weeks, column: "sold", over: 2, take: "mean" }))).toEqual([
      Number.NaN,
      5,
      Number.NaN,
      Number.NaN,
    ]);
    expect(last(windowed(gapped, { ...weeks, column: "sold", over: 2, take: "mean", needed: 1 }))).toEqual([
      4, 5, 10, 10,
    ]);
  });

  test("from the first row on takes all that is recorded so far", () => {
    expect(last(windowed(gapped, { ...weeks, column: "sold", take: "sum" }))).toEqual([4, 10, 20, 20]);
  });

  test("can be summarised by mean, sum, least, most, middle, deviation, last and count", () => {
    const table = tableOf({ week: [1, 2, 3, 4], sold: [2, 4, 4, 10] });
    const taken = (take: never) => last(windowed(table, { ...weeks, column: "sold", over: 4, take })).at(-1);
    const names = ["mean", "sum", "least", "most", "middle", "last", "count"] as never[];
    expect(names.map(taken)).toEqual([5, 20, 2, 10, 4, 10, 4]);
    // Squares of -3, -1, -1, 5 add up to 36; over n - 1 = 3 that is 12.
    expect(taken("deviation" as never)).toBeCloseTo(Math.sqrt(12), 14);
    expect(() => taken("average" as never)).toThrow(
      "one of mean, sum, least, most, middle, deviation, last, count",
    );
  });
});

describe("filling", () => {
  test("gives every period a row and says which cells were filled", () => {
    const made = filled(gapped, { ...weeks, column: "sold", with: "previous" });
    expect(made).toEqual({
      names: ["week", "sold", "sold filled"],
      columns: [
        Float64Array.from([1, 2, 3, 4, 5]),
        Float64Array.from([4, 6, 6, 10, 10]),
        [false, false, true, false, true],
      ],
    });
    expect(Array.from(filled(gapped, { ...weeks, column: "sold", with: "between" }).columns[1]!)).toEqual([
      4,
      6,
      8,
      10,
      Number.NaN,
    ]);
    expect(Array.from(filled(gapped, { ...weeks, column: "sold", with: 0 }).columns[1]!)).toEqual([
      4, 6, 0, 10, 0,
    ]);
  });

  test("names missing month ends as month ends, and missing half hours by their time", () => {
    const owed = tableOf({ date: ["2026-01-31", "2026-04-30"], owed: [300, 210] });
    const made = filled(owed, { period: "date", step: "month-end", column: "owed", with: "between" });
    expect(made.columns).toEqual([
      ["2026-01-31", "2026-02-28", "2026-03-31", "2026-04-30"],
      Float64Array.from([300, 270, 240, 210]),
      [false, true, true, false],
    ]);
    const read = tableOf({ at: ["2026-01-31 23:30", "2026-02-01 00:30"], od: [1, 3] });
    expect(
      Array.from(
        filled(read, { period: "at", step: "half-hour", column: "od", with: "previous" }).columns[0]!,
      ),
    ).toEqual(["2026-01-31 23:30", "2026-02-01 00:00", "2026-02-01 00:30"]);
    const weekly = tableOf({ year: [2020, 2021], week: [52, 1], sold: [1, 2] });
    expect(() =>
      filled(weekly, { period: ["year", "week"], step: "iso-week", column: "sold", with: 0 }),
    ).toThrow("so that the missing periods can be named");
  });

  test("needs a rule that is stated", () => {
    expect(() => filled(gapped, { ...weeks, column: "sold", with: "nearest" as never })).toThrow(
      '"previous", "between" or a number',
    );
  });
});

describe("another period", () => {
  const date = ["2026-01-30", "2026-01-31", "2026-02-01", "2026-02-03", "2026-03-01", "2026-03-02"];
  const days = tableOf({ date, sold: [1, 2, 4, 8, 16, null], held: [9, 8, 7, 6, 5, 4] });

  test("adds flows up, takes the last level, and gives nothing for a period with a gap or a missing cell", () => {
    const months = toPeriods(days, {
      period: "date",
      step: "day",
      to: "month",
      take: { sold: "sum", held: "last" },
    });
    expect(months.names).toEqual(["date", "sold", "held", "rows"]);
    expect(months.columns).toEqual([
      ["2026-01-30", "2026-02-01", "2026-03-01"],
      Float64Array.from([3, Number.NaN, Number.NaN]),
      Float64Array.from([8, Number.NaN, 4]),
      Float64Array.from([2, 2, 2]),
    ]);
    // A flow adds up and a level takes its last value, as they are stated for observations.
    const measured = { sold: "flow", held: "level" } as const;
    expect(toPeriods(days, { period: "date", step: "day", to: "month", measured })).toEqual(months);
    expect(() => toPeriods(days, { period: "date", step: "day", to: "month" })).toThrow(
      'measured: { paid: "flow", owed: "level" }',
    );
  });

  test("of numbers counts in their own unit", () => {
    const hours = tableOf({ hour: [0, 12, 24, 36], fed: [1, 2, 3, 4] });
    const made = toPeriods(hours, {
      period: "hour",
      step: { every: 12, of: "hour" },
      to: { every: 24, of: "hour" },
      take: { fed: "sum" },
    });
    expect(Array.from(made.columns[1]!)).toEqual([3, 7]);
    expect(() =>
      toPeriods(hours, { period: "hour", step: { every: 12, of: "hour" }, to: "day", take: { fed: "sum" } }),
    ).toThrow("a number of hour, because the periods are numbers and not dates");
  });
});

describe("long and wide", () => {
  test("a wide table has a column a series, and nothing where there was nothing", () => {
    const long = tableOf({ week: [1, 1, 2], item: ["rope", "tar", "tar"], sold: [4, 6, 7] });
    expect(wider(long, { keep: "week", names: "item", values: "sold" })).toEqual({
      names: ["week", "rope", "tar"],
      columns: [Float64Array.from([1, 2]), Float64Array.from([4, Number.NaN]), Float64Array.from([6, 7])],
    });
  });

  test("two values for one cell are refused with both rows", () => {
    const long = tableOf({ week: [1, 1], item: ["tar", "tar"], sold: [6, 7] });
    expect(() => wider(long, { keep: "week", names: "item", values: "sold" })).toThrow(
      'Rows 1 and 2 both give the cell "tar"',
    );
  });

  test("any wide table made long and wide again is the same table", () => {
    const wideTable = fc.integer({ min: 1, max: 8 }).chain((rows) =>
      fc
        .array(
          fc.array(fc.oneof(fc.integer(), fc.constant(Number.NaN)), { minLength: rows, maxLength: rows }),
          { minLength: 1, maxLength: 4 },
        )
        .map(
          (columns): ColumnTable => ({
            names: ["week", ...columns.map((_, i) => `item ${i}`)],
            columns: [
              Float64Array.from({ length: rows }, (_, i) => i),
              ...columns.map((cells) => Float64Array.from(cells)),
            ],
          }),
        ),
    );
    const options = { keep: "week", names: "item", values: "sold" };
    fc.assert(
      fc.property(wideTable, (table) => {
        expect(wider(longer(table, options), options)).toEqual(table);
      }),
      { seed: 20260401, numRuns: 100 },
    );
  });
});
