import * as fc from "fast-check";
import { expect, test } from "vitest";
import {
  type CalendarName,
  indexOf,
  labelAt,
  type ObservationOptions,
  observations,
  type PeriodAxis,
  periodsAfter,
  type StepLength,
  tableOf,
} from "../../src/record/index.js";

const seeded = { seed: 20260401, numRuns: 200 };

function axisOf(cells: readonly unknown[], step: StepLength | CalendarName): PeriodAxis {
  const table = tableOf({ at: cells, v: cells.map((_, i) => i + 1) });
  return observations(table, { period: "at", step, value: "v" }).axis;
}

const two = (n: number): string => String(n).padStart(2, "0");
/** The engine of the language counts days here, so that the arithmetic under test is not its own judge. */
const iso = (moment: number, length = 10): string =>
  new Date(moment).toISOString().slice(0, length).replace("T", " ");
const year = fc.integer({ min: 1800, max: 2199 });
const day = fc.integer({ min: Date.UTC(1800, 0, 1) / 86_400_000, max: Date.UTC(2199, 11, 31) / 86_400_000 });

interface Case {
  readonly cells: readonly unknown[];
  readonly step: StepLength | CalendarName;
  /** Periods in 400 years. */
  readonly reach: number;
}

/** Two dates a month apart, on a day that shorter months clamp. */
const monthly = (step: Case["step"], months: number): fc.Arbitrary<Case> =>
  fc.tuple(year, fc.integer({ min: 0, max: 11 }), fc.integer({ min: 1, max: 31 })).map(([y, m, d]) => {
    const at = (month: number): string => {
      const last = new Date(Date.UTC(y, month + 1, 0)).getUTCDate();
      return iso(Date.UTC(y, month, Math.min(d, last)));
    };
    return { cells: [at(m), at(m + months)], step, reach: 4800 / months };
  });

const fixed = (step: Case["step"], milliseconds: number, length = 10): fc.Arbitrary<Case> =>
  day.map((from) => {
    const start = from * 86_400_000;
    return {
      cells: [iso(start, length), iso(start + milliseconds, length)],
      step,
      reach: 146_097 * (86_400_000 / milliseconds),
    };
  });

const named = (
  step: Case["step"],
  perYear: number,
  text: (y: number, n: number) => string,
): fc.Arbitrary<Case> =>
  fc
    .tuple(year, fc.integer({ min: 1, max: perYear }))
    .map(([y, n]) => ({ cells: [text(y, n)], step, reach: 400 * perYear }));

const calendars: Readonly<Record<string, fc.Arbitrary<Case>>> = {
  "months on one day": monthly("month", 1),
  "ends of months": monthly("month-end", 1),
  "every second month": monthly({ every: 2, of: "month" }, 2),
  "dated quarters": monthly("quarter", 3),
  "dated years": monthly("year", 12),
  days: fixed("day", 86_400_000),
  "twenty-eight days": fixed("28-day", 28 * 86_400_000),
  weeks: fixed("week", 7 * 86_400_000),
  "weeks by date": fixed("iso-week", 7 * 86_400_000),
  "half hours": fixed("half-hour", 1_800_000, 16),
  "twelve hours": fixed({ every: 12, of: "hour" }, 12 * 3_600_000, 16),
  minutes: fixed({ every: 15, of: "minute" }, 900_000, 16),
  seconds: fixed({ every: 5, of: "second" }, 5000, 19),
  "numbered weeks": named("iso-week", 52, (y, n) => `${y}-W${two(n)}`),
  "fortnights by week": named({ every: 2, of: "week" }, 52, (y, n) => `${y}-W${two(n)}`),
  "numbered months": named("month", 12, (y, n) => `${y}-${two(n)}`),
  "numbered quarters": named("quarter", 4, (y, n) => `${y}-Q${n}`),
  "fiscal years": named("year", 1, (y) => `${y}/${two((y + 1) % 100)}`),
  "named fiscal years": named("year", 1, (y) => `FY${y}`),
  "fiscal years of dates": day.map((d) => ({
    cells: [iso(d * 86_400_000)],
    step: { every: 1, of: "year", begins: "04-06" },
    reach: 400,
  })),
  "trading periods": named("4-4-5", 12, (y, n) => `${y}-P${two(n)}`),
  numbers: fc
    .tuple(fc.integer({ min: -5000, max: 5000 }), fc.integer({ min: 1, max: 40 }))
    .map(([first, every]) => ({
      cells: [first / 8, (first + every) / 8],
      step: { every: every / 8, of: "hour" },
      reach: 3_506_328,
    })),
};

test.each(Object.entries(calendars))(
  "a label of %s names the period that it was made for, over 400 years",
  (_, given) => {
    const place = fc.double({ min: -1, max: 1, noNaN: true });
    void fc.assert(
      fc.property(given, place, ({ cells, step, reach }, share) => {
        const axis = axisOf(cells, step);
        const index = Math.round(share * reach) + 0;
        expect(indexOf(axis, labelAt(axis, index))).toBe(index);
        if (typeof cells[0] === "string" && step !== "month-end" && axis.form !== "year-pair")
          expect(labelAt(axis, 0)).toBe(cells[0]);
      }),
      seeded,
    );
  },
);

test("an axis is data: it survives cloning and JSON with all its answers", () => {
  const axis = axisOf(["2025-01-31", "2025-02-28"], "month");
  for (const copy of [structuredClone(axis), JSON.parse(JSON.stringify(axis)) as PeriodAxis]) {
    expect(copy).toEqual(axis);
    expect(labelAt(copy, 3)).toBe("2025-04-30");
    expect(indexOf(copy, "2025-04-30")).toBe(3);
  }
});

test("a record begun later lies as many periods after as its first label says", () => {
  const shift = fc.integer({ min: 0, max: 4000 });
  void fc.assert(
    fc.property(
      fc.constantFrom(...Object.values(calendars)).chain((given) => given),
      shift,
      ({ cells, step }, k) => {
        const axis = axisOf(cells, step);
        const cell = (index: number): unknown => {
          const label = labelAt(axis, index);
          return axis.counts === "numbers" ? Number(label) : label;
        };
        expect(periodsAfter(axis, axisOf([cell(k), cell(k + 1)], step))).toBe(k);
      },
    ),
    seeded,
  );
});

test("a record read by dates is the one read by numbers", () => {
  const gaps = fc.array(fc.integer({ min: 1, max: 3 }), { minLength: 3, maxLength: 30 });
  void fc.assert(
    fc.property(gaps, year, fc.integer({ min: 1, max: 31 }), (steps, y, d) => {
      let at = 0;
      const index = [0, ...steps.map((step) => (at += step))];
      const date = index.map((month) => {
        const last = new Date(Date.UTC(y, month + 1, 0)).getUTCDate();
        return iso(Date.UTC(y, month, Math.min(d, last)));
      });
      const owed = index.map((i) => 900 - i);
      const options = {
        step: "month",
        value: "owed",
        inputs: ["paid"],
      } as const satisfies Partial<ObservationOptions>;
      const paid = index.map((i) => i % 7);
      const byDate = observations(tableOf({ at: date, owed, paid }), { ...options, period: "at" });
      const byNumber = observations(tableOf({ at: index, owed, paid }), { ...options, period: "at" });
      const [dated, numbered] = [byDate.groups[0]!, byNumber.groups[0]!];
      expect(dated.index).toEqual(numbered.index);
      expect(dated.time).toEqual(numbered.time);
      expect(dated.values).toEqual(numbered.values);
      expect(dated.inputs).toEqual(numbered.inputs);
      expect(byDate.findings.map(({ kind, row }) => [kind, row])).toEqual(
        byNumber.findings.map(({ kind, row }) => [kind, row]),
      );
    }),
    seeded,
  );
});
