import { describe, expect, test } from "vitest";
import { type ObservationOptions, observations, tableOf } from "../../src/record/index.js";

const loans = tableOf({
  loan: ["A", "A", "A", "B", "B", "X", "X"],
  month: ["2025-01", "2025-02", "2025-03", "2025-01", "2025-02", "2025-01", "2025-02"],
  owed: [10, 9, 8, 20, 18, 5, "n/a"],
});
const options: ObservationOptions = { period: "month", step: "month", by: "loan", value: "owed" };

function rowsOf(more: Partial<ObservationOptions>): readonly number[] {
  return observations(loans, { ...options, ...more }).groups.flatMap(({ rows }) => [...rows]);
}

describe("rows", () => {
  test("are chosen by what cells hold, do not hold, or lie between", () => {
    expect(rowsOf({ where: { loan: "A" } })).toEqual([1, 2, 3]);
    expect(rowsOf({ where: { loan: ["A", "B"] } })).toEqual([1, 2, 3, 4, 5]);
    expect(rowsOf({ where: { loan: { not: "X" } } })).toEqual([1, 2, 3, 4, 5]);
    expect(rowsOf({ where: { loan: { not: ["X", "A"] } } })).toEqual([4, 5]);
    expect(rowsOf({ where: { loan: { not: "X" }, month: { from: "2025-02" } } })).toEqual([2, 3, 5]);
    expect(rowsOf({ where: { loan: { not: "X" }, month: { until: "2025-02" } } })).toEqual([1, 2, 4, 5]);
    expect(rowsOf({ where: { loan: "A", owed: { from: 9, until: 10 } } })).toEqual([1, 2]);
  });

  test("are chosen by their numbers", () => {
    expect(rowsOf({ rows: { from: 2, until: 5, except: 4 } })).toEqual([2, 3, 5]);
    expect(() => rowsOf({ rows: { until: 9 } })).toThrow("its rows are 1 to 7");
  });

  test("that are not chosen are not read: what they hold is of no concern", () => {
    const total = tableOf({ month: ["2025-01", "2025-02", "Total"], owed: [10, 9, 19] });
    const read = { period: "month", step: "month", value: "owed" } as const;
    expect(() => observations(total, read)).toThrow('"Total" - ambiguous date');
    expect(observations(total, { ...read, rows: { until: 2 } }).counts).toMatchObject({
      aside: 1,
      read: 2,
      used: 2,
    });
  });

  test("none of which is left are refused with what the columns hold", () => {
    expect(() => rowsOf({ where: { loan: "Z" } })).toThrow(
      'No row of the record meets where: {"loan":"Z"}. "loan" holds "A", "B", "X".',
    );
    expect(() => rowsOf({ where: { month: { from: "spring" } } })).toThrow(
      "{ from: ..., until: ... } with dates",
    );
    expect(() => rowsOf({ where: { month: { form: "2025-02" } as never } })).toThrow("is no condition on");
  });
});

describe("columns", () => {
  test("are found whatever invisible signs a file left at the ends of their names", () => {
    const table = tableOf({ "\ufeffmonth": [1, 2], "catch\r": [5, 6], v: [1, 2] });
    const read = observations(table, { period: "month", step: "month", value: "v", inputs: ["catch"] });
    expect([...read.groups[0]!.inputs["catch"]!]).toEqual([5, 6]);
  });

  test("with invisible signs inside are shown with them", () => {
    const table = tableOf({ month: [1], "ca\u200btch": [5], v: [1] });
    expect(() => observations(table, { period: "month", step: "month", value: "catch" })).toThrow(
      'Its columns are "month", "ca\\u200btch", "v". Did you mean "ca\\u200btch"?',
    );
  });
});

describe("levels and flows", () => {
  // Common practice of bookkeeping, no source: of a month's postings balances are the last, payments add up.
  const month3 = tableOf({
    month: [1, 2, 3, 3, 4],
    paid: [100, 100, 100, 100, 90],
    owed: [1000, 900, 810, 710, 620],
  });
  const monthly: ObservationOptions = { period: "month", step: "month", value: "owed", inputs: ["paid"] };

  test("of one period: a level takes the last, a flow the sum, and both are entered as decisions", () => {
    const read = observations(month3, {
      ...monthly,
      measured: { owed: "level", paid: "flow" },
      duplicates: "last",
    });
    const [group] = read.groups;
    expect([...group!.values["owed"]!]).toEqual([1000, 900, 710, 620]);
    expect([...group!.inputs["paid"]!]).toEqual([100, 100, 200, 90]);
    expect(read.flows).toEqual(["paid"]);
    expect(read.findings[0]!.done).toBe("owed: the last kept; paid: added up");
    expect(read.decisions?.map(({ column, was, now, why }) => [column, was, now, why])).toEqual([
      ["owed", "810, 710", 710, 'rows 3 and 4 are of one period; duplicates: "last"'],
      ["paid", "100, 100", 200, "rows 3 and 4 are of one period; paid is a flow, and flows are added up"],
    ]);
    expect(read.counts).toMatchObject({ read: 5, used: 5, refused: 0 });
  });

  test("an input of which neither is stated is never dropped without a word", () => {
    const read = observations(month3, { ...monthly, duplicates: "last" });
    expect(read.findings[0]!.message).toContain(
      'Of paid (100, 100) one is used as well; if it is a flow, write measured: { paid: "flow" }.',
    );
    expect(read.decisions?.map(({ column, now }) => [column, now])).toEqual([
      ["owed", 710],
      ["paid", 100],
    ]);
  });

  test("each column may have a choice of its own; levels are not added up", () => {
    const { groups } = observations(month3, { ...monthly, duplicates: { owed: "first", paid: "sum" } });
    expect([groups[0]!.values["owed"]![2], groups[0]!.inputs["paid"]![2]]).toEqual([810, 200]);
    expect(() => observations(month3, { ...monthly, duplicates: { owed: "last" } })).toThrow(
      "Possible duplicate",
    );
    expect(() =>
      observations(month3, { ...monthly, measured: { owed: "level" }, duplicates: "sum" }),
    ).toThrow('Write duplicates: "last"');
    expect(() => observations(month3, { ...monthly, measured: { payed: "flow" } })).toThrow(
      'Did you mean "paid"?',
    );
  });

  test("an empty cell beside a filled one of its period is no duplicate", () => {
    const table = tableOf({ month: [1, 2, 2, 3], paid: [5, 7, null, 6], owed: [90, null, 83, 77] });
    const read = observations(table, monthly);
    expect([...read.groups[0]!.values["owed"]!]).toEqual([90, 83, 77]);
    expect([...read.groups[0]!.inputs["paid"]!]).toEqual([5, 7, 6]);
    expect(read.findings).toEqual([]);
  });

  test("a row with an empty level keeps its inputs, before and after the last level", () => {
    const table = tableOf({
      month: [1, 2, 3, 4, 5, 6, 7],
      paid: [1, 100, 100, 0, 90, 80, 70],
      owed: [null, 900, 810, null, 620, 560, null],
    });
    const read = observations(table, monthly);
    const [group] = read.groups;
    expect([...group!.index]).toEqual([0, 1, 3, 4]);
    expect(group!.withoutValue).toEqual({
      index: Int32Array.of(2, 5),
      inputs: { paid: Float64Array.of(0, 70) },
      rows: Int32Array.of(4, 7),
    });
    expect(
      read.findings.filter(({ kind }) => kind === "missing-value").map(({ row, done }) => [row, done]),
    ).toEqual([
      [1, "left out"],
      [4, "value left out; inputs kept"],
      [7, "value left out; inputs kept"],
    ]);
    expect(read.counts).toMatchObject({ read: 7, used: 6, refused: 1 });
  });
});
