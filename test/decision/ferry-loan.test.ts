// The ferry loan of notebooks/debt.ipynb, against a ledger kept in whole cents: interest rounded half up each month (common
// practice), no binary fraction anywhere.
import { expect, test } from "vitest";
import { solveFor, timeToReach } from "../../src/decision/index.js";
import { simulate } from "../../src/projection/index.js";
import { recurrence } from "../../src/rule/index.js";

const owedNow = 15_899_427n;

/** Months until nothing is owed; rates in hundredths of a per cent a year, payments in cents, both by month from 1. */
function monthsToClear(rate: (month: number) => bigint, payment: (month: number) => bigint): number {
  let owed = owedNow;
  for (let month = 1; month <= 1200; month++) {
    const interest = (2n * owed * rate(month) + 120_000n) / 240_000n;
    owed += interest;
    owed -= payment(month) < owed ? payment(month) : owed;
    if (owed === 0n) return month;
  }
  return Number.POSITIVE_INFINITY;
}

const ledger = recurrence(
  "interest = round(rate[t+1]/12*owed, 2)\npaid = min(payment[t+1], owed + interest)\nowed[t+1] = owed + interest - paid",
  { inputs: ["rate", "payment"] },
);
const now = {
  initial: { owed: Number(owedNow) / 100 },
  periods: 240,
  period: "month",
  startsAt: 28,
} as const;

test("each scenario clears the loan in the month that the ledger in cents does", () => {
  const found = timeToReach(
    simulate(ledger, {
      ...now,
      scenarios: {
        "as agreed": { rate: 0.048, payment: 1480 },
        step: { rate: { usual: 0.048, from: { 41: 0.058 } }, payment: 1480 },
        missed: { rate: 0.048, payment: { usual: 1480, at: { 31: 0, 32: 0, 33: 0 } } },
      },
    }),
    { state: "owed", fallsTo: 0 },
  );
  const missed = new Set([3, 4, 5]);
  const months = [
    monthsToClear(
      () => 480n,
      () => 148_000n,
    ),
    monthsToClear(
      (month) => (month >= 13 ? 580n : 480n),
      () => 148_000n,
    ),
    monthsToClear(
      () => 480n,
      (month) => (missed.has(month) ? 0n : 148_000n),
    ),
  ];
  expect(found.groups.map((group) => group.firstPeriod)).toEqual(months.map((month) => 28 + month));
});

test("the payment that clears it by month 120 is the smallest in whole cents that does", () => {
  const found = solveFor(ledger, {
    ...now,
    inputs: { rate: 0.048 },
    vary: "payment",
    range: [700, 5000],
    multiple: 0.01,
    until: { time: "owed", fallsTo: 0, atMost: 120 },
  });
  const cents = BigInt(Math.round(found.solutions[0]!.value * 100));
  expect(
    monthsToClear(
      () => 480n,
      () => cents,
    ),
  ).toBe(92);
  expect(
    monthsToClear(
      () => 480n,
      () => cents - 1n,
    ),
  ).toBe(93);
});
