import { describe, expect, test } from "vitest";
import { type ObservationOptions, observations, tableOf } from "../../src/record/index.js";

const weekly: ObservationOptions = { period: "week", step: { every: 1, of: "week" }, value: "stock" };

function messages(columns: Record<string, unknown[]>, options: ObservationOptions = weekly): string[] {
  return observations(tableOf(columns), options).findings.map(
    ({ kind, message, done }) => `${kind}: ${message} [${done}]`,
  );
}

const weeks = (count: number): number[] => Array.from({ length: count }, (_, i) => i + 1);

describe("debt records", () => {
  // Common practice of loan reviews, no source: 1,000 + 10 - 50 is 960, and 961 is named with its difference.
  test("a closing balance that does not foot is named with its difference to the cent", () => {
    const columns = {
      month: [5, 6, 7, 8],
      opening: [1080, 1040, 1000, 961],
      interest: [10, 10, 10, 10],
      paid: [50, 50, 50, 50],
      closing: [1040, 1000, 961, 921],
    };
    const options: ObservationOptions = {
      period: "month",
      step: "month",
      value: "closing",
      identities: ["closing = opening + interest - paid"],
    };
    expect(messages(columns, options)).toEqual([
      "does-not-foot: Row 3: closing 961, expected 960; difference 1 unexplained (closing = opening + interest - paid). [kept; totals are open until it is classified]",
    ]);
  });

  test("an opening balance that is not the last closing one is found, with the decimals of the record", () => {
    const columns = { month: [1, 2, 3], opening: [100.5, 90.25, 82], closing: [90.25, 80.1, 70] };
    const options: ObservationOptions = {
      period: "month",
      step: "month",
      value: "closing",
      identities: ["opening = closing[t-1]"],
    };
    expect(messages(columns, options)).toEqual([
      "does-not-foot: Row 3: opening 82.00, expected 80.10; difference 1.90 unexplained (opening = closing[t-1]). [kept; totals are open until it is classified]",
    ]);
  });

  test("binary fractions alone do not unfoot a sum", () => {
    const columns = { month: [1, 2], a: [0.1, 0.7], b: [0.2, 0.1], c: [0.3, 0.8] };
    expect(
      messages(columns, { period: "month", step: "month", value: "c", identities: ["c = a + b"] }),
    ).toEqual([]);
  });

  test("a sum that cannot be read is refused with its place and the nearest column", () => {
    const columns = { month: [1], "interest due": [1], closing: [1] };
    const refused = (text: string) => () =>
      messages(columns, { period: "month", step: "month", value: "closing", identities: [text] });
    expect(refused("closing = interest due + clsing")).toThrowErrorMatchingInlineSnapshot(`
      [ModelError: The sum could not be read.
          closing = interest due + clsing
                                   ^
      It is one column, "=", and columns added and subtracted, such as closing = opening + interest - paid. Columns: "month", "interest due", "closing". Did you mean "closing"?]
    `);
    expect(refused("closing is nothing")).toThrow("It is one column");
    expect(refused("closing = interest due *")).toThrow("The sum could not be read.");
  });

  test("two equal payments of one day are asked about and never dropped unasked", () => {
    const columns = { date: ["2026-03-02", "2026-03-02"], paid: [412, 412] };
    const options: ObservationOptions = { period: "date", step: "day", value: "paid", measured: "flow" };
    expect(() => messages(columns, options)).toThrow(
      /at rows 1 and 2, with the same value \(412, 412\)\. Possible duplicate - keep both\?/,
    );
    const kept = observations(tableOf(columns), { ...options, duplicates: "sum" });
    expect(Array.from(kept.groups[0]!.values["paid"]!)).toEqual([824]);
    expect(kept.decisions).toEqual([
      {
        row: 1,
        column: "paid",
        was: "412, 412",
        now: 824,
        why: 'rows 1 and 2 are of one period; duplicates: "sum"',
        who: "",
      },
    ]);
  });

  test("a change of currency is refused", () => {
    const columns = { week: [1, 2, 3], stock: [1, 2, 3], currency: ["GBP", "GBP", "EUR"] };
    expect(() => messages(columns)).toThrow(
      'The record mixes units: currency is "GBP" at row 1 and "EUR" at row 3. Convert the values first, or keep them apart with by or where: { currency: "GBP" }.',
    );
    expect(messages(columns, { ...weekly, where: { currency: "GBP" } })).toEqual([]);
  });

  test("a credit balance is found", () => {
    expect(messages({ week: [1, 2, 3], stock: [40, 10, -20] })).toEqual([
      "negative-level: week 3: stock -20; a receipt is missing or late, or a sign is turned. [kept]",
    ]);
  });
});

describe("culture records", () => {
  test("a reading repeated at the top is suspected to be the reader's ceiling", () => {
    const stock = [0.5, 0.9, 1.6, 2.7, 3.5, 3.5, 3.5, 3.5];
    expect(messages({ week: weeks(8), stock })).toEqual([
      "ceiling: Reader ceiling suspected: 3.5 is repeated 4 times; right-censored from week 5. [kept]",
    ]);
    // Once they are declared censored, nothing more is suspected.
    expect(messages({ week: weeks(8), stock }, { ...weekly, censored: { above: 3.5 } })).toEqual([]);
  });

  test("the lowest reading repeated is suspected to be a detection limit", () => {
    expect(messages({ week: weeks(8), stock: [0.04, 0.04, 0.04, 0.06, 0.09, 0.15, 0.24, 0.4] })).toEqual([
      "floor: Detection limit suspected: the lowest value 0.04 is repeated 3 times from week 1; left-censored there. [kept]",
    ]);
  });

  test("readings at zero and below are told, since they have no logarithm", () => {
    expect(messages({ week: weeks(5), stock: [0.3, 0, 0.4, 0.5, 0.6] })).toEqual([
      "zero-level: Row 2: level 0 has no logarithm; choose censored, count model, or exclude. [kept]",
    ]);
  });

  test("a bubble in one reading is a spike against its neighbours", () => {
    const stock = [0.1, 0.13, 0.169, 0.23, 0.9, 0.37, 0.483, 0.62, 0.81];
    const found = observations(tableOf({ week: weeks(9), stock }), weekly).findings;
    expect(found.map(({ kind, row }) => [kind, row])).toEqual([["spike", 5]]);
  });

  test("texts with a limit sign are refused until they are said to be limits", () => {
    const columns = { week: [1, 2, 3], stock: ["<0.05", 0.1, ">3.5"] };
    expect(() => messages(columns)).toThrow(
      'Row 1, stock: "<0.05" is not a number. If it means a value beyond a limit, say censored: "signs".',
    );
    const [group] = observations(tableOf(columns), { ...weekly, censored: "signs" }).groups;
    expect(Array.from(group!.values["stock"]!)).toEqual([0.05, 0.1, 3.5]);
    expect(Array.from(group!.censoring!["stock"]!)).toEqual([-1, 0, 1]);
  });

  test("limits as numbers and flag columns mark values as censored", () => {
    const columns = { week: [1, 2, 3], stock: [20, 14, 20], "sold out": ["yes", "", "no"] };
    const sides = (censored: ObservationOptions["censored"]) =>
      Array.from(
        observations(tableOf(columns), { ...weekly, ...(censored && { censored }) }).groups[0]!.censoring?.[
          "stock"
        ] ?? [],
      );
    expect(sides({ above: "sold out" })).toEqual([1, 0, 0]);
    expect(sides({ above: 20, below: 14 })).toEqual([1, -1, 1]);
    expect(sides(undefined)).toEqual([]);
  });

  test("technical replicates of a series are averaged, with their number and spread", () => {
    const columns = {
      flask: ["a", "a", "a", "a", "b"],
      well: [1, 2, 1, 2, 1],
      week: [1, 1, 2, 2, 1],
      stock: [4, 6, 8, 8, 3],
    };
    const counts = observations(tableOf(columns), { ...weekly, by: "flask", replicates: "well" });
    const [a, b] = counts.groups;
    expect(Array.from(a!.values["stock"]!)).toEqual([5, 8]);
    expect(Array.from(a!.replicates!["stock"]!.count)).toEqual([2, 2]);
    // Of 4 and 6: squares of 1 and 1 over n - 1 = 1.
    expect(Array.from(a!.replicates!["stock"]!.deviation)).toEqual([Math.SQRT2, 0]);
    expect(b!.replicates).toBeUndefined();
    expect(counts.counts).toEqual({ read: 5, used: 5, flagged: 1, corrected: 0, refused: 0 });
  });

  test("read times that differ by little are taken at their step, and by much refused", () => {
    const hourly: ObservationOptions = { period: "hours", step: { every: 0.5, of: "hour" }, value: "stock" };
    const columns = { hours: [0.004, 0.504, 1.03, 1.5], stock: [1, 2, 3, 4] };
    const counts = observations(tableOf(columns), hourly);
    expect(Array.from(counts.groups[0]!.index)).toEqual([0, 1, 2, 3]);
    expect(Array.from(counts.groups[0]!.time)).toEqual(columns.hours);
    expect(counts.findings.map(({ kind, row }) => [kind, row])).toEqual([
      ["off-step", 3],
      ["off-step", 4],
    ]);
    expect(() => messages({ hours: [0, 0.7], stock: [1, 2] }, hourly)).toThrow(
      "0.7 lies 1.4 steps of 0.5 hours after the first row",
    );
    expect(
      Array.from(
        observations(tableOf({ hours: [0, 0.7], stock: [1, 2] }), { ...hourly, offStep: "nearest" })
          .groups[0]!.index,
      ),
    ).toEqual([0, 1]);
  });
});

describe("stock records", () => {
  test("a level of evenly changing values shows the one change that is unlike the others", () => {
    const stock = [1000, 980, 961, 943, 900, 884, 868, 853, 838, 824, 811, 798, 786, 774];
    const found = observations(tableOf({ week: weeks(14), stock }), weekly).findings;
    expect(found.map(({ kind, row }) => [kind, row])).toEqual([["odd-change", 5]]);
    expect(found[0]!.message).toBe(
      "week 5: the change -43 from 943 to 900 is unlike the changes before and after it.",
    );
  });

  test("negative book stock is named by its week", () => {
    expect(messages({ week: [13, 14, 15], stock: [3, -4, 20] })).toEqual([
      "negative-level: week 14: stock -4; a receipt is missing or late, or a sign is turned. [kept]",
    ]);
  });

  test("a week that appears twice with different issues is refused with both rows", () => {
    expect(() => messages({ week: [8, 9, 9], stock: [1, 31, 36] })).toThrow(
      "week 9 appears 2 times, at rows 2 and 3, with different values (31, 36).",
    );
  });

  test("cases counted as single pieces are seen as a jump by twelve", () => {
    const stock = [40, 42, 39, 41, 492, 480, 504, 500];
    const found = observations(tableOf({ week: weeks(8), stock }), weekly).findings;
    expect(found.map(({ kind, row }) => [kind, row])).toEqual([["unit-jump", 5]]);
    expect(found[0]!.message).toContain("492 is about 41 times 12");
  });

  test("one bulk order is told apart from the demand of other weeks", () => {
    const stock = [30, 34, 29, 31, 36, 33, 240, 28, 32];
    const found = observations(tableOf({ week: weeks(9), stock }), { ...weekly, measured: "flow" }).findings;
    expect(found.map(({ kind, row }) => [kind, row])).toContainEqual(["bulk", 7]);
  });

  test("demand with many zeros is called sporadic, with its share and variance over mean", () => {
    const stock = [0, 0, 5, 0, 0, 0, 3, 0, 0, 4];
    const found = observations(tableOf({ week: weeks(10), stock }), { ...weekly, measured: "flow" }).findings;
    expect(found.map(({ kind }) => kind)).toEqual(["many-zeros"]);
    // Mean 1.2, sum of squares 50: (50 - 10 * 1.44)/9 = 3.9556, over the mean 3.296.
    expect(found[0]!.message).toContain("7 of 10 values of stock are zero (variance over mean 3.3)");
  });

  test("a quantity that takes both signs is told once, not row by row", () => {
    const found = observations(tableOf({ week: weeks(6), stock: [1, -2, 3, -1, 2, -3] }), weekly).findings;
    expect(found.map(({ kind }) => kind)).toEqual(["both-signs"]);
  });

  test("a stocktake that differs from the book is found by a sum", () => {
    const columns = { week: [4, 5], stock: [86, 78], counted: [83, null] };
    expect(messages(columns, { ...weekly, identities: ["counted = stock"] })).toEqual([
      "does-not-foot: Row 1: counted 83, expected 86; difference -3 unexplained (counted = stock). [kept; totals are open until it is classified]",
    ]);
  });
});

describe("in every domain", () => {
  test("a value that never changes, a single row, and a step that no two rows are apart are told", () => {
    expect(messages({ week: [1, 2, 3], stock: [5, 5, 5] })).toEqual([
      "never-changes: The value of stock never changes: multiplier 1 cannot be separated from no process. [kept]",
    ]);
    expect(messages({ week: [1], stock: [5] })).toEqual([
      "single-row: The record has a single usable row: no change can be seen in it. [kept]",
    ]);
    expect(messages({ week: [1, 3, 5], stock: [5, 6, 7] })).toEqual([
      'step-at-odds: Every pair of rows spans 2 steps of 1 week, or a multiple of that: the step is probably not the one of the record. If one step is what lies between two rows, write step: { every: 2, of: "week" }. [used as 2-step pairs]',
    ]);
    expect(messages({ week: [1, 3, 6], stock: [5, 6, 7] })).toEqual([
      "gap: Row 2: week 3 follows 1; one period is missing. [used as a 2-step pair]",
      "gap: Row 3: week 6 follows 3; 2 periods are missing. [used as a 3-step pair]",
      "no-single-step: No two rows lie one step (1 week) apart; the closest lie 2 steps (2 weeks) apart. [used as multi-step pairs]",
    ]);
  });

  // Common practice, no source: half-hourly readings with three of them an hour apart.
  test("mixed steps are told with how many of each there are", () => {
    const hours = [0, 0.5, 1, 2, 2.5, 3.5, 4, 5];
    const found = observations(tableOf({ hours, stock: hours.map((hour) => 2 + hour) }), {
      period: "hours",
      step: { every: 0.5, of: "hour" },
      value: "stock",
    }).findings;
    expect(found.at(-1)!.message).toBe(
      "Steps of 0.5 and 1 hours occur: the rule is applied per 0.5 hours; 3 pairs span 2 steps.",
    );
  });

  test("rows out of order are refused with the row, or sorted and named when chosen", () => {
    const columns = { week: [1, 3, 2], stock: [5, 7, 6] };
    expect(() => messages(columns)).toThrow("Times are not increasing at row 3: week 2 follows 3.");
    const sorted = observations(tableOf(columns), { ...weekly, disorder: "sort" });
    expect(Array.from(sorted.groups[0]!.rows)).toEqual([1, 3, 2]);
    expect(sorted.findings.map(({ kind, done }) => [kind, done])).toEqual([["disorder", "sorted by period"]]);
  });

  test("findings of one kind are listed up to a hundred and counted beyond", () => {
    const week = Array.from({ length: 300 }, (_, i) => Math.floor(2.5 * i));
    const found = observations(tableOf({ week, stock: week.map((w) => 1000 + w) }), weekly);
    expect(found.findings).toHaveLength(102);
    expect(found.findings.at(-1)!.message).toBe(
      '199 more findings of the kind "gap" are counted and not listed.',
    );
    expect(found.counts.flagged).toBe(299);
  });

  test("series are told apart even where their names would join to the same text", () => {
    const columns = { a: ["x, y", "x"], b: ["z", "y, z"], week: [1, 1], stock: [1, 2] };
    expect(observations(tableOf(columns), { ...weekly, by: ["a", "b"] }).groups).toHaveLength(2);
  });

  test("a row that does not say its series is left out and named", () => {
    const found = observations(tableOf({ item: ["a", null], week: [1, 2], stock: [1, 2] }), {
      ...weekly,
      by: "item",
    });
    expect(found.findings[0]!.message).toBe("Row 2 does not say which series it belongs to: item is empty.");
    expect(found.counts).toMatchObject({ used: 1, refused: 1 });
  });

  test("weights are carried with their rows, and must be positive", () => {
    const columns = { week: [1, 2], stock: [5, 6], weight: [1, 4] };
    expect(
      Array.from(observations(tableOf(columns), { ...weekly, weight: "weight" }).groups[0]!.weights!),
    ).toEqual([1, 4]);
    expect(() => messages({ ...columns, weight: [1, 0] }, { ...weekly, weight: "weight" })).toThrow(
      "must be a column of positive numbers",
    );
  });

  test("several states share rows, and a row that lacks one of them is left out", () => {
    const columns = { week: [1, 2, 3], hare: [10, 12, null], lynx: [3, 4, 5] };
    const both = observations(tableOf(columns), {
      period: "week",
      step: "week",
      values: { H: "hare", L: "lynx" },
      unit: { H: "thousand" },
    });
    expect(both.states).toEqual([
      { name: "H", column: "hare", unit: "thousand", measured: "level" },
      { name: "L", column: "lynx", unit: "", measured: "level" },
    ]);
    expect(Array.from(both.groups[0]!.values["L"]!)).toEqual([3, 4]);
  });

  test("names of columns are data: __proto__ and markup are columns like any other", () => {
    const table = {
      names: ["__proto__", "<b>n</b>"],
      columns: [
        [1, 2],
        [5, 6],
      ],
    };
    const found = observations(table, { period: "__proto__", step: "week", value: "<b>n</b>" });
    expect(Array.from(found.groups[0]!.values["<b>n</b>"]!)).toEqual([5, 6]);
  });
});
