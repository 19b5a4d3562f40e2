import { describe, expect, test } from "vitest";
import { fit, observations, recurrence } from "../../kernel-helpers/index.js";
import { bundleOf } from "../../kernel-helpers/tables/index.js";
import { unitClash } from "../../src/rule/index.js";

const owed = (unit: string, values: object = { value: "owed" }): ReturnType<typeof observations> =>
  observations(
    { month: [0, 1, 2, 3, 4, 5, 6, 7], owed: [80, 75, 69, 66, 60, 54, 51, 44] },
    { period: "month", step: { every: 1, of: "month" }, unit, ...values },
  );
const rule = (unit: string, state = "owed"): ReturnType<typeof recurrence> =>
  recurrence(`${state}[t+1] = ${state} + c`, { units: { [state]: unit } });
const options = { errors: "observation" } as const;

describe("units of record and rule", () => {
  test("a clash is a warning with both units and what to write, in the table as well", async () => {
    const fitted = fit(rule("EUR"), owed("crwons"), options);
    const [warning] = fitted.warnings;
    expect(warning!.code).toBe("units-disagree");
    expect(warning!.message).toContain(
      'The record gives "owed" in crwons, and the rule states EUR for owed.',
    );
    expect(warning!.message).toContain(
      '`units: { owed: "crwons" }` with the rule, or `unit: "EUR"` in observations(...)',
    );
    expect(`${(await bundleOf(fitted))!["text/plain"]}`).toContain("The record gives");
  });

  test("either remedy leaves no warning", () => {
    expect(fit(rule("crwons"), owed("crwons"), options).warnings).toEqual([]);
    expect(fit(rule("EUR"), owed("EUR"), options).warnings).toEqual([]);
  });

  test("one that counts in multiples of the other is refused, with the factor", () => {
    expect(() => fit(rule("EUR"), owed("1000 EUR"), options)).toThrow(
      'The record gives "owed" in 1000 EUR, and the rule states EUR for owed: a factor of 1000 apart.',
    );
    expect(fit(rule("1000 EUR"), owed("1000 EUR"), options).warnings).toEqual([]);
  });

  test("a unit that one of the two does not state is not compared", () => {
    expect(fit(rule("EUR"), owed(""), options).warnings).toEqual([]);
    expect(fit(recurrence("owed[t+1] = owed + c"), owed("EUR"), options).warnings).toEqual([]);
  });

  test("a record that reads a state up to a factor has a unit of its own", () => {
    const indexed = observations(
      {
        year: [0, 1, 2, 3, 4, 5, 6, 7],
        index: [8, 7.5, 7, 6.4, 6.1, 5.4, 5, 4.5],
        landed: [5, 5, 6, 5, 6, 5, 5, 6],
      },
      { period: "year", step: "year", values: { B: "index" }, unit: "kg/h", inputs: { C: "landed" } },
    );
    const removal = recurrence("B[t+1] = B - C", { inputs: ["C"], units: { B: "t", C: "t" } });
    const fitted = fit(removal, indexed, { errors: "observation", factor: { B: "q" } });
    expect(fitted.warnings.filter(({ code }) => code === "units-disagree")).toEqual([]);
  });
});

describe("a state and the column it is fitted to", () => {
  const noted = (fitted: ReturnType<typeof fit>): boolean =>
    fitted.conventions.some((line) => line.includes('owd of the rule is fitted to the column "owed"'));

  test("is noted where both were the only one and their names differ", () => {
    expect(noted(fit(rule("EUR", "owd"), owed("EUR"), options))).toBe(true);
  });

  test("is not noted where the record says so itself", () => {
    expect(noted(fit(rule("EUR", "owd"), owed("EUR", { values: { owd: "owed" } }), options))).toBe(false);
    expect(fit(rule("EUR"), owed("EUR"), options).conventions.join()).not.toContain(
      "is fitted to the column",
    );
  });
});

// Source: arithmetic of the stated factors.
test.each([
  ["cells/mL", "cells per mL", undefined],
  ["10^4 cells/mL", "cells/mL", 1e4],
  ["10^4 cells/mL", "10000 cells/mL", undefined],
  ["cells/mL", "10^6 cells/mL", 1e-6],
  ["pieces", "1000 pieces/week", 1e-3],
  ["EUR", "crowns", "kind"],
  ["", "crowns", undefined],
] as const)("%j against %j", (one, other, clash) => {
  const found = unitClash(one, other);
  if (typeof clash === "number") expect((found as number) / clash).toBeCloseTo(1, 12);
  else expect(found).toBe(clash);
});
