import fc from "fast-check";
import { expect, test } from "vitest";
import { correct, observations, tableOf, undo } from "../../src/record/index.js";

const loan = tableOf({ month: [1, 2, 3, 4], closing: [1000, 960, 961, 880] });
const options = { period: "month", step: { every: 1, of: "month" }, value: "closing" } as const;

test("a correction leaves the cells as they were read, and is used, found and counted", () => {
  const corrected = correct(loan, {
    row: 3,
    column: "closing",
    now: 921,
    why: "digits turned",
    who: "A. K.",
  });
  expect(corrected.columns).toBe(loan.columns);
  const owed = observations(corrected, options);
  expect(Array.from(owed.groups[0]!.values["closing"]!)).toEqual([1000, 960, 921, 880]);
  expect(owed.findings[0]!.message).toBe(
    "Row 3, closing: 921 is used instead of 961: digits turned (A. K.).",
  );
  expect(owed.decisions).toEqual([
    { row: 3, column: "closing", was: 961, now: 921, why: "digits turned", who: "A. K." },
  ]);
  expect(owed.counts).toEqual({ read: 4, used: 4, flagged: 1, corrected: 1, refused: 0 });
});

test("a row can be left out, which leaves a gap", () => {
  const owed = observations(correct(loan, { row: 3, why: "of another loan" }), options);
  expect(Array.from(owed.groups[0]!.index)).toEqual([0, 1, 3]);
  expect(owed.counts).toEqual({ read: 4, used: 3, flagged: 2, corrected: 1, refused: 1 });
});

test("the second correction of a cell remembers the first", () => {
  const once = correct(loan, { row: 3, column: "closing", now: 921, why: "digits turned" });
  const twice = correct(once, { row: 3, column: "closing", now: 920, why: "letter of the lender" });
  expect(twice.decisions!.map(({ was, now }) => [was, now])).toEqual([
    [961, 921],
    [921, 920],
  ]);
});

test("corrections without a reason, of rows or columns that are not there, are refused", () => {
  expect(() => correct(loan, { row: 3, column: "closing", now: 1, why: " " })).toThrow("gives no reason");
  expect(() => correct(loan, { row: 5, column: "closing", now: 1, why: "x" })).toThrow(
    "The record has no row 5; its rows are 1 to 4",
  );
  expect(() => correct(loan, { row: 1, column: "closng", now: 1, why: "x" })).toThrow(
    'Did you mean "closing"?',
  );
  expect(() => undo(loan)).toThrow("There is no correction to take back.");
});

test("any corrections, all taken back, leave the record as it was", () => {
  const correction = fc.record({
    row: fc.integer({ min: 1, max: 4 }),
    column: fc.constantFrom("month", "closing", undefined),
    now: fc.oneof(fc.double(), fc.string(), fc.constant(null)),
    why: fc.constant("a reason"),
  });
  fc.assert(
    fc.property(fc.array(correction, { minLength: 1, maxLength: 8 }), (corrections) => {
      let table = loan;
      for (const { column, ...rest } of corrections)
        table = correct(table, column === undefined ? rest : { ...rest, column });
      for (const _ of corrections) table = undo(table);
      expect(table).toEqual(loan);
    }),
    { seed: 20260401, numRuns: 100 },
  );
});
