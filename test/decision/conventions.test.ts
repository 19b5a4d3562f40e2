// What a measure is read from, and what is said where a question misses it.
import { describe, expect, test } from "vitest";
import { optimize, solveFor, tradeoff } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const store = recurrence(
  "left = max(0, S - demand)\nshort = max(0, demand - S)\ncost = h*left + b*short\ndemand[t+1] = m",
  { fixed: { h: 1, b: 9, m: 6 } },
);
const stocked = {
  parameters: { S: 5 },
  initial: { demand: 6 },
  noise: { demand: { distribution: "poisson" } },
  periods: 3,
  vary: "S",
  paths: 20_000,
} as const;

describe("a quantity of a period is worked out from the states before it", () => {
  const why =
    "is the same on every path, so it does not depend on chance there: a quantity of period k is worked out from the states at the end of period k-1, before the chance of period k.";

  test("so in the first it meets the demand that is given, and the answer says so", () => {
    // By hand: demand 6 at the start, so S = 5 leaves 1 short and S = 6 costs nothing.
    const asked = tradeoff(store, { ...stocked, values: [5], answers: { short: { level: "short", at: 1 } } });
    expect(asked.rows[0]!.answers["short"]).toBe(1);
    expect(asked.rows[0]!.errors["short"]).toBe(0);
    expect(asked.sentence).toContain(`The value of short 1 period ahead ${why}`);
    const best = optimize(store, {
      ...stocked,
      range: [0, 20],
      multiple: 1,
      minimize: { level: "cost", at: 1 },
    });
    expect([best.value, best.achieved]).toEqual([6, 0]);
    expect(best.sentence).toContain(why);
    const solved = solveFor(store, {
      ...stocked,
      range: [0, 5.5],
      until: { level: "short", at: 1, is: 2 },
    });
    expect(solved.solutions[0]!.value).toBeCloseTo(4, 4);
    expect(solved.sentence).toContain(why);
  });

  test("and in the second the random demand of the first", () => {
    // Source: E max(0, D - 5) = 1.5180592049 for D Poisson of mean 6 (SciPy, sum over the distribution).
    const asked = tradeoff(store, { ...stocked, values: [5], answers: { short: { level: "short", at: 2 } } });
    const { answers, errors } = asked.rows[0]!;
    expect(Math.abs(answers["short"]! - 1.5180592049)).toBeLessThan(4.5 * errors["short"]!);
    expect(asked.sentence).not.toContain("every path");
  });

  test("and a measure ahead begins at period 1", () => {
    expect(() =>
      tradeoff(store, { ...stocked, values: [5], answers: { demand: { level: "demand", at: 0 } } }),
    ).toThrow(
      "A measure looks ahead, from period 1 on; 0 was given. Give a period of 1 to 3; the present value is in the result of `forecast` at the record's end, and of `simulate` in its first row.",
    );
  });

  test("and has no random change of its own", () => {
    const ask = (noise: object) => () =>
      tradeoff(store, {
        ...stocked,
        noise: noise as (typeof stocked)["noise"],
        values: [5],
        answers: { risk: { probability: "short", risesTo: 1 } },
      });
    expect(ask({})).toThrow(
      'The probability that short gets to a level needs a rule with random change of a state (demand; short is a quantity, which follows from them). Give it, as in noise: { demand: { distribution: "normal", sd: 1 } }, or ask for a `time` instead.',
    );
    expect(ask({ demand: { distribution: "normal", sd: 1 } })).not.toThrow();
  });
});

const monthEnd = (month: number): string => new Date(Date.UTC(2025, month + 1, 0)).toISOString().slice(0, 10);

/** 5,000 at 1% a month less what is paid, 300, with readings off by a few euros. */
function loanFit(off: number) {
  const owed = [5000];
  for (let i = 1; i < 12; i++) owed.push(owed[i - 1]! * 1.01 - 300);
  const read = owed.map((each, i) => each + off * (((i * 7) % 5) - 2));
  const at = owed.map((_, i) => monthEnd(i));
  const record = observations(tableOf({ at, owed: read, paid: owed.map(() => 300) }), {
    period: "at",
    step: "month-end",
    value: "owed",
    inputs: ["paid"],
  });
  return fit(recurrence("owed[t+1] = max(0, owed*(1 + i) - paid[t+1])", { inputs: ["paid"] }), record, {
    errors: "observation",
  });
}

describe("a loan on a record of month ends", () => {
  const fitted = loanFit(3);
  const { i } = fitted.groups[0]!.parameters as { i: number };
  const now = (): number => {
    const first = tradeoff(fitted, {
      vary: "paid",
      values: [0],
      periods: 1,
      answers: { owed: { level: "owed", at: 1 } },
    });
    return first.rows[0]!.answers["owed"]! / (1 + i);
  };
  /** The level payment that clears what is owed now in so many months: p = i B/(1 - (1+i)^-n), of any text on interest. */
  const level = (months: number): number => (i * now()) / (1 - (1 + i) ** -months);

  test("asks for a range where an input has no plan", () => {
    expect(() =>
      solveFor(fitted, { vary: "paid", periods: 10, until: { level: "owed", at: 10, atMost: 0 } }),
    ).toThrow("No range for paid. Give the lowest and the highest value with range: [low, high].");
  });

  test("gives the payment before it was rounded, with the interval of that", () => {
    const asked = {
      vary: "paid",
      range: [50, 900],
      periods: 10,
      until: { level: "owed", at: 10, atMost: 500 },
    } as const;
    const plainly = solveFor(fitted, asked).solutions[0]!;
    const found = solveFor(fitted, { ...asked, multiple: 50 });
    const [rounded] = found.solutions;
    // Closed form: B (1+i)^10 - p ((1+i)^10 - 1)/i = 500.
    const grown = (1 + i) ** 10;
    const exact = ((now() * grown - 500) * i) / (grown - 1);
    expect(rounded!.exact / exact).toBeCloseTo(1, 9);
    expect(rounded!.value).toBe(Math.ceil(exact / 50) * 50);
    expect(rounded!.margin!.lower! / plainly.margin!.lower!).toBeCloseTo(1, 4);
    expect(rounded!.margin!.upper! / plainly.margin!.upper!).toBeCloseTo(1, 4);
    expect(rounded!.margin!.lower!).toBeLessThan(exact);
    expect(rounded!.margin!.upper!).toBeGreaterThan(exact);
    expect(found.sentence).toMatch(
      /^With paid at or above \d+ \(before rounding [\d.]+, 95% interval [\d.]+ to [\d.]+\)/,
    );
  });

  test("is cleared at a period of the record", () => {
    const cleared = tradeoff(fitted, {
      vary: "paid",
      values: [400],
      periods: 20,
      answers: { cleared: { time: "owed", fallsTo: 1 } },
    });
    // Closed form of the balance after n months, first at or below 1.
    const months = Math.ceil(Math.log((400 / i - 1) / (400 / i - now())) / Math.log(1 + i));
    expect(cleared.sentence).toContain(`cleared ${monthEnd(11 + months)}`);
  });

  test("is not asked for a time that is past", () => {
    const ask = (atMost: number | string) => () =>
      solveFor(fitted, {
        vary: "paid",
        range: [50, 900],
        periods: 20,
        until: { time: "owed", fallsTo: 1, atMost } as never,
      });
    // Twelve month ends of 2025, and twenty periods ahead.
    expect(ask(6)).toThrow(
      'The time `atMost` of the target, 6 in the numbers of the record, is 2025-07-31, before the present, 2025-12-31. A time that can be asked for is from 2026-01-31 to 2027-08-31; 6 periods ahead is atMost: "2026-06-30".',
    );
    expect(ask("2025-07-31")).toThrow(
      "is 2025-07-31, before the present, 2025-12-31. A time that can be asked for is from 2026-01-31 to 2027-08-31; 6 periods ahead",
    );
    expect(ask("2026-06-30")).not.toThrow();
  });

  test("has the same best from the payment that clears it on", () => {
    const found = optimize(fitted, {
      vary: "paid",
      range: [100, 900],
      periods: 10,
      minimize: { level: "owed", at: 10 },
    });
    expect(found.achieved).toBe(0);
    // The search ends at a relative width of 1e-9.
    expect(found.value / level(10)).toBeCloseTo(1, 8);
    expect(found.plateau).toEqual({ from: found.value, to: 900 });
    expect([found.lower, found.upper, found.atEnd]).toEqual([undefined, undefined, false]);
    expect(found.sentence).toMatch(
      /is smallest, 0, with paid at \d+\.\d+, and the same for every value looked at from there to 900, the end of the range, provided/,
    );
  });
});
