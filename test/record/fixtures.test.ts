import { describe, expect, test } from "vitest";
import { differences, observations } from "../../src/record/index.js";
import { readTable } from "../../src/store/index.js";

const fixture = (name: string) => readTable(`test/record/fixtures/${name}.csv`);

describe("the hidden faults of the invented records are found", () => {
  test("the loan lacks month 9, and its fee shows as a payment that brought down too little", async () => {
    const loan = await fixture("ferry-loan");
    const owed = observations(loan, {
      period: "month",
      step: "month",
      value: "closing_balance",
      inputs: ["payment"],
    });
    expect(owed.findings[0]!.message).toBe("Row 10: month 10 follows 8; one period is missing.");
    expect(
      owed.findings.filter(({ kind }) => kind === "odd-change").map(({ row, message }) => [row, message]),
    ).toEqual([
      [
        14,
        "month 14: the change -281.05 from 14574.61 to 14293.56 is unlike the changes before and after it.",
      ],
    ]);
    expect(owed.counts).toEqual({ read: 24, used: 24, flagged: 2, corrected: 0, refused: 0 });
    // Interest is the change plus the payment: with 412.00 paid and 35.00 charged in month 14, the implied
    // interest there is 130.95 (the value stated with the record), 35.00 above its neighbours' course.
    const [series] = differences(owed).series;
    const at = Array.from(series!.rows).indexOf(14);
    expect((series!.change[at]! + 412).toFixed(2)).toBe("130.95");
    expect(series!.steps[Array.from(series!.rows).indexOf(10)]).toBe(2);
  });

  test("the plate lacks a reading of A2 at 4.0 h and has two of A3 at 7.5 h", async () => {
    const plate = await fixture("plate");
    const options = {
      period: "hours",
      step: { every: 0.5, of: "hour" },
      value: "od600",
      by: "well",
      where: { kind: "sample" },
    } as const;
    expect(() => observations(plate, options)).toThrow(
      /hours 7.5 appears 2 times in "A3", at rows 65 and 66, with different values \(0.308, 0.312\)/,
    );
    const wells = observations(plate, { ...options, duplicates: "average" });
    expect(wells.groups.map(({ name, index }) => [name, index.length])).toEqual([
      ["A1", 25],
      ["A2", 24],
      ["A3", 25],
    ]);
    expect(wells.findings.filter(({ kind }) => kind === "gap").map(({ message }) => message)).toEqual([
      'Row 34 of "A2": hours 4.5 follows 3.5; one period is missing.',
    ]);
    expect(wells.decisions).toHaveLength(1);
    expect(wells.counts).toMatchObject({ read: 75, used: 75, corrected: 1, refused: 0 });
  });

  test("the stock trace foots in every week, event by event", async () => {
    const trace = await fixture("stock-trace");
    const stock = observations(trace, {
      period: "week",
      step: "week",
      value: "closing_on_hand",
      order: "receive, fill backorders, meet demand, count, order",
      identities: [
        "demand = served + short",
        "closing_on_hand = closing_on_hand[t-1] + received - backorders[t-1] - served",
      ],
    });
    // 11 were short in week 12: they leave the receipt of week 13 first. Row 13 foots only with that term.
    expect(stock.findings.filter(({ kind }) => kind === "does-not-foot")).toEqual([]);
    expect(stock.findings.map(({ kind }) => kind)).toContain("zero-level");
  });
});
