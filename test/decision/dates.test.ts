import { expect, test } from "vitest";
import { nextReading, solveFor, timeToReach } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { changePoint } from "../../src/evidence/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const monthEnd = (month: number): string => new Date(Date.UTC(2025, month + 1, 0)).toISOString().slice(0, 10);
const loan = recurrence("owed[t+1] = owed*(1 + i) - p");

/** 5,000 at 1% a month less 300, with readings off by a few cents. */
function balances(count: number): number[] {
  const owed = [5000];
  for (let i = 1; i < count; i++) owed.push(owed[i - 1]! * 1.01 - 300 + (((i * 7) % 3) - 1) / 50);
  return owed;
}

const record = (cells: readonly unknown[], step: "month-end" | "month" | "iso-week") =>
  observations(tableOf({ at: cells, owed: balances(cells.length) }), {
    period: "at",
    step,
    value: "owed",
    unit: "EUR",
  });

// Closed form: the balance is 0 after -ln(1 - 0.01*5000/300)/ln(1.01) = 18.32 months.
test("a time is told by the labels of the record's calendar", () => {
  const when = (cells: readonly unknown[], step: Parameters<typeof record>[1]): string => {
    const ahead = forecast(fit(loan, record(cells, step), { errors: "observation" }), {
      periods: 14,
      paths: 200,
    });
    return timeToReach(ahead, { state: "owed", fallsTo: 0 }).groups[0]!.words.time!;
  };
  const twelve = Array.from({ length: 12 }, (_, i) => i);
  expect(when(twelve.map(monthEnd), "month-end")).toBe("between 2026-07-31 and 2026-08-31");
  // Begun on 28 February, on the 28th of every month since.
  expect(
    when(
      twelve.map((i) => `${monthEnd(i + 1).slice(0, 8)}28`),
      "month",
    ),
  ).toBe("between 2026-08-28 and 2026-09-28");
  // ISO 8601: 2026 has a week 53, so eighteen weeks after 2026-W44 is 2027-W09.
  const weeks = twelve.map((i) => (i < 10 ? `2026-W${44 + i}` : `2027-W0${i - 9}`));
  expect(when(weeks, "iso-week")).toBe("between 2027-W09 and 2027-W10");
  expect(
    when(
      twelve.map((i) => 28 + i),
      "month",
    ),
  ).toMatch(/^at month 46\.3/);
});

test("a simulation that starts from a record tells dates without translation", () => {
  const dated = record(
    Array.from({ length: 6 }, (_, i) => monthEnd(i)),
    "month-end",
  );
  const run = simulate(loan, { parameters: { i: 0.01, p: 300 }, record: dated, periods: 24 });
  expect(run.groups[0]!.labels?.[0]).toBe("2025-06-30");
  const { sentence } = timeToReach(run, { state: "owed", fallsTo: 0 });
  expect(sentence).toContain("between 2026-07-31 and 2026-08-31");
});

test("what is sought and what is answered are dates", () => {
  const fitted = fit(
    loan,
    record(
      Array.from({ length: 12 }, (_, i) => monthEnd(i)),
      "month-end",
    ),
    { errors: "observation" },
  );
  const until = { time: "owed", fallsTo: 0, atMost: "2026-04-30" } as const;
  const asked = { vary: "p", periods: 40, range: [100, 900] } as const;
  const dated = solveFor(fitted, { ...asked, until });
  // Month 15 of the record, counted from January 2025.
  const counted = solveFor(fitted, { ...asked, until: { ...until, atMost: 15 } });
  expect(dated.solutions).toEqual(counted.solutions);
  expect(dated.sentence).toContain("falls to 0 EUR at 2026-04-30");
  expect(() => solveFor(fitted, { ...asked, until: { ...until, atMost: "next spring" } })).toThrow(
    '"next spring" names no single period of the projection; its periods are 2025-01-31, 2025-02-28 and so on.',
  );
  const reading = nextReading(fitted, {
    periods: 6,
    answer: { parameter: "p" },
    values: { from: "2026-01", to: "2026-03" },
  });
  expect(reading.choices).toHaveLength(3);
  expect(reading.sentence).toContain("at 2026-03-31");
});

test("a change is dated", () => {
  const cells = Array.from({ length: 40 }, (_, i) => monthEnd(i));
  const v = [100];
  for (let i = 1; i < 40; i++) v.push(v[i - 1]! + (i < 21 ? 5 : -3) + (((i * 7) % 5) - 2) * 0.3);
  const dated = observations(tableOf({ at: cells, v }), { period: "at", step: "month-end", value: "v" });
  const { groups, sentence } = changePoint(recurrence("v[t+1] = v + c"), dated);
  expect(groups[0]!.labels.date).toBe(cells[21]);
  expect(sentence).toContain(`The rule changed from ${cells[21]} on`);
});
