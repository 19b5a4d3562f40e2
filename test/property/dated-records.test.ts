import * as fc from "fast-check";
import { expect, test } from "vitest";
import { type Fit, type FitOptions, fit, updateFit } from "../../src/estimate/index.js";
import { forecast } from "../../src/projection/index.js";
import { labelAt, type ObservationOptions, observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const seeded = { seed: 20260401, numRuns: 25 };
const loan = recurrence("owed[t+1] = owed*(1 + i) - paid[t+1]", { inputs: ["paid"] });

/** Month ends by the engine of the language, from January of a year on. */
const monthEnd = (year: number, month: number): string =>
  new Date(Date.UTC(year, month + 1, 0)).toISOString().slice(0, 10);
const isoWeek = (first: number, week: number): string => {
  const monday = new Date(first + 7 * 86_400_000 * week);
  const thursday = new Date(monday.getTime() + 3 * 86_400_000);
  const start = Date.UTC(thursday.getUTCFullYear(), 0, 1);
  const number = Math.floor((thursday.getTime() - start) / (7 * 86_400_000)) + 1;
  return `${thursday.getUTCFullYear()}-W${String(number).padStart(2, "0")}`;
};

interface Ledger {
  readonly index: readonly number[];
  readonly owed: readonly number[];
  readonly paid: readonly number[];
}

/** Balances at 1% a period with payments that differ, read with small errors; some periods are missing. */
const ledger: fc.Arbitrary<Ledger> = fc
  .array(fc.tuple(fc.integer({ min: -40, max: 40 }), fc.integer({ min: 80, max: 130 })), {
    minLength: 12,
    maxLength: 20,
  })
  .map((rows) => {
    let owed = 5000;
    return {
      index: rows.map((_, i) => i),
      paid: rows.map(([, paid]) => paid),
      owed: rows.map(([error, paid], i) => {
        if (i > 0) owed = owed * 1.01 - paid;
        return owed + error / 10;
      }),
    };
  });

const ways: Readonly<
  Record<string, { readonly step: ObservationOptions["step"]; readonly cell: (i: number) => unknown }>
> = {
  "ends of months": { step: "month-end", cell: (i) => monthEnd(2025, i) },
  "months on the 28th": { step: "month", cell: (i) => `${monthEnd(2025, i).slice(0, 8)}28` },
  "ISO weeks": { step: "iso-week", cell: (i) => isoWeek(Date.UTC(2026, 9, 26), i) },
  days: { step: "day", cell: (i) => new Date(Date.UTC(2024, 1, 20 + i)).toISOString().slice(0, 10) },
  numbers: { step: "month", cell: (i) => 28 + i },
};

function recordOf({ index, owed, paid }: Ledger, way: string, from = 0, end = index.length) {
  const { step, cell } = ways[way]!;
  const rows = index.slice(from, end);
  const table = tableOf({
    at: rows.map(cell),
    owed: rows.map((i) => owed[i]!),
    paid: rows.map((i) => paid[i]!),
  });
  return observations(table, { period: "at", step: step!, value: "owed", inputs: ["paid"] });
}

const numbersOf = (fitted: Fit): readonly unknown[] =>
  fitted.groups.map(({ estimates, criteria }) => [
    estimates.map(({ name, value, standardError, profile }) => [name, value, standardError, profile]),
    criteria,
  ]);

test.each(Object.keys(ways))(
  "the fit of a record of %s, updated with its later rows, is that of the whole",
  (way) => {
    const errors = fc.constantFrom<FitOptions["errors"]>("process", "observation");
    void fc.assert(
      fc.property(ledger, fc.double({ min: 0.5, max: 0.9, noNaN: true }), errors, (rows, share, errors) => {
        const cut = Math.max(7, Math.round(share * rows.index.length));
        const first = fit(loan, recordOf(rows, way, 0, cut), { errors });
        const updated = updateFit(first, recordOf(rows, way, cut)).fit;
        const whole = fit(loan, recordOf(rows, way), { errors });
        expect(numbersOf(updated)).toEqual(numbersOf(whole));
        expect(updated.observations.groups[0]).toEqual(whole.observations.groups[0]);
        expect(updated.observations.axis).toEqual(whole.observations.axis);
      }),
      seeded,
    );
  },
);

test("a record read by dates gives the fit and the forecast of the one read by numbers, with dates", () => {
  const way = fc.constantFrom(...Object.keys(ways).filter((name) => name !== "numbers"));
  void fc.assert(
    fc.property(ledger, way, (rows, way) => {
      const options = { errors: "observation" } as const;
      const dated = fit(loan, recordOf(rows, way), options);
      const numbered = fit(loan, recordOf(rows, "numbers"), options);
      expect(numbersOf(dated)).toEqual(numbersOf(numbered));
      const last = rows.index.length - 1;
      const { cell } = ways[way]!;
      const plan = { usual: 100, at: { [String(cell(last + 2))]: 0 } };
      const asked = { periods: 6, paths: 50 };
      const ahead = forecast(dated, { ...asked, inputs: { paid: plan } }).groups[0]!;
      const counted = forecast(numbered, {
        ...asked,
        inputs: { paid: { usual: 100, at: { [28 + last + 2]: 0 } } },
      }).groups[0]!;
      expect(ahead.states).toEqual(counted.states);
      expect(ahead.labels).toEqual(ahead.index.map(cell));
      expect(labelAt(ahead.axis, last + 6)).toBe(cell(last + 6));
    }),
    seeded,
  );
});
