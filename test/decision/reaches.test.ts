import { describe, expect, test } from "vitest";
import { timeToReach } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";
import { cultureRecord, flaskRecord } from "./harbour-records.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", {
  bounds: { R: [1, Infinity], K: [0, Infinity] },
});

describe("a culture on its way to a density", () => {
  const fitted = fit(sheltered, cultureRecord(), { errors: "observation", distribution: "lognormal" });
  const ahead = forecast(fitted, { periods: 40, paths: 4000, seed: 2 });

  test("gets to .80 at 8.145 h, and at the first half hour at 8.5", () => {
    // Source: the same record fitted in R 4.2 (nls); time by the closed form ln(A(K-N0)/(N0(K-A)))/r, interval by the delta
    // method with t(18), printed to a thousandth: half a unit, and what four digits of the estimates leave.
    const { groups } = timeToReach(ahead, { risesTo: 0.8 });
    const [answer] = groups;
    expect(answer!.time).toBeCloseTo(8.145, 3);
    expect(answer!.meanPath!.lower).toBeCloseTo(8.055, 3);
    expect(answer!.meanPath!.upper).toBeCloseTo(8.236, 3);
    expect(answer!.firstPeriod).toBe(8.5);
    // The draws carry the same margin; their limits scatter by .002 (quantile error of 4000 draws), profile 8.058 to 8.239.
    expect(Math.abs(answer!.lower! - 8.058)).toBeLessThan(0.008);
    expect(Math.abs(answer!.upper! - 8.239)).toBeLessThan(0.008);
    expect(answer!.never).toBe(0);
  });

  test("does not get to 1.8, and says where it levels off", () => {
    // Source: as above: capacity 1.52 (1.41 to 1.65 by its profile); the level at the end of the forecast is within 0.1% of it.
    const found = timeToReach(forecast(fitted, { periods: 60, seed: 2 }), {
      risesTo: 1.8,
    });
    expect(found.groups[0]!.time).toBeUndefined();
    expect(found.groups[0]!.tendsTo!.value).toBeCloseTo(1.52, 2);
    expect(found.sentence).toMatch(
      /^N does not reach 1\.8 by hour 40; the path levels off near 1\.52\d? \(95% interval 1\.4\d+ to 1\.6\d+\)(; in (fewer than 1 in 1000|about 0\.\d+%) (of )?paths it does)?,/,
    );
  });

  test("says so in one sentence", () => {
    expect(timeToReach(ahead, { risesTo: 0.8 }).sentence).toMatch(
      /^N reaches 0\.8 at hour 8\.14\d \(95% interval 8\.0\d\d to 8\.2\d\d\), within the record; the first period at or past it is hour 8\.5, provided it goes on as in the record of 21 values to hour 10, by the rule N\[t\+1\] = R\*N\/\(1 \+ \(R - 1\)\*N\/K\)\. The margin is that of the fitted parameters, not of a further reading's error\. A recorded value of N is at or past the level already at hour 8\.5\.$/,
    );
  });
});

describe("a walk in normal steps", () => {
  const periods = 10;
  const found = simulate(recurrence("x[t+1] = x + c"), {
    parameters: { c: 0 },
    initial: { x: 0 },
    periods,
    noise: { x: { distribution: "normal", sd: 1 } },
    paths: 50_000,
    seed: 8,
  });
  const passage = timeToReach(found, { fallsTo: -1e-12 });

  test("first passes below its start by n with probability 1 - C(2n, n)/4^n", () => {
    // Source: Sparre Andersen (1953), Mathematica Scandinavica 1:263: exact for any symmetric continuous step (from memory).
    // Tolerance: 4.5 Monte-Carlo errors.
    let staying = 1;
    for (let n = 1; n <= periods; n++) {
      staying *= (2 * n - 1) / (2 * n);
      const by = passage.groups[0]!.distribution.find((row) => row.time === n)!.by;
      expect(Math.abs(by - (1 - staying))).toBeLessThan(4.5 * Math.sqrt((staying * (1 - staying)) / 50_000));
    }
    expect(passage.groups[0]!.never).toBeCloseTo(1 - passage.groups[0]!.distribution[periods - 1]!.by, 12);
  });

  test("the Monte-Carlo error printed with the probability is the spread over 50 seeds", () => {
    const again = Array.from(
      { length: 50 },
      (_, seed) =>
        timeToReach(
          simulate(recurrence("x[t+1] = x + c"), {
            parameters: { c: 0 },
            initial: { x: 0 },
            periods,
            noise: { x: { distribution: "normal", sd: 1 } },
            paths: 1000,
            seed: seed + 1,
          }),
          { fallsTo: -1e-12 },
        ).groups[0]!,
    );
    const mean = again.reduce((sum, each) => sum + each.never, 0) / 50;
    const spread = Math.sqrt(again.reduce((sum, each) => sum + (each.never - mean) ** 2, 0) / 49);
    // A standard deviation from 50 values is known to 10%; 3.3 of those.
    expect(Math.abs(spread / again[0]!.neverError - 1)).toBeLessThan(0.33);
  });
});

test.each([
  [125, undefined],
  [126, 69],
  [130, 30],
  [150, 12],
])("a logistic stock of 500 under a catch of %i a year is gone in year %s", (H, year) => {
  // Source: iteration of N' = N + .5 N (1 - N/1000) - H from 500, first N <= 0 (general-purpose arithmetic); 125 is the largest
  // sustainable yield rK/4 and keeps 500 for ever.
  const rule = recurrence("N[t+1] = N + r*N*(1 - N/K) - H");
  const found = simulate(rule, { parameters: { r: 0.5, K: 1000, H }, initial: { N: 500 }, periods: 100 });
  expect(timeToReach(found, { fallsTo: 0 }).groups[0]!.firstPeriod).toBe(year);
});

test.each([
  ["a catch of 100", "catch = min(B, c)", { c: 100 }, 0.842],
  ["a share h .20", "catch = h*B", { h: 0.2 }, 0.454],
])("the risk of a stock below 200 in 30 years under %s", (_, line, catchParameters, risk) => {
  // Source: 200,000 runs in a general-purpose program, printed to a thousandth, stated tolerance .004.
  const rule = recurrence(`${line}\nB[t+1] = max(B + r*B*(1 - B/K) - catch, 0)`);
  const found = simulate(rule, {
    parameters: { r: 0.4, K: 1000, ...catchParameters },
    initial: { B: 600 },
    periods: 30,
    noise: { B: { distribution: "lognormal", sd: 0.25, centre: "mean" } },
    paths: 200_000,
    watch: [{ fallsTo: 200 }],
    seed: 77,
  });
  expect(found.groups[0]!.ensemble.future).toHaveLength(0);
  const { never } = timeToReach(found, { fallsTo: 200 }).groups[0]!;
  expect(Math.abs(1 - never - risk)).toBeLessThan(0.004);
  expect(() => timeToReach(found, { fallsTo: 210 })).toThrow(
    'The paths were too many to keep, and this level of B was not watched. Run it again with watch: [{ state: "B", fallsTo: 210 }].',
  );
});

describe("several flasks", () => {
  const scatter = [0.02, -0.03, 0.01, 0.025, -0.02, 0.015, -0.01, 0.03, -0.025, 0.005];
  const flask = (R: number, shift: number): number[] =>
    scatter.map((_, t) => 5 * R ** t * Math.exp(scatter[(t + shift) % 10]!));
  const counts = flaskRecord({ A: flask(1.3, 0), B: flask(1.25, 3), C: flask(1.35, 6) });
  const growth = recurrence("N[t+1] = R*N");
  const fitted = fit(growth, counts, { errors: "observation", distribution: "lognormal" });
  const found = timeToReach(forecast(fitted, { periods: 12, paths: 500 }), {
    risesTo: 120,
    newUnit: true,
  });

  test("are answered for in one sentence that names the first and the last", () => {
    expect(found.sentence).toMatch(
      /^N reaches 120 ×10⁴ cells\/mL first in flask C, at hour \d+\.\d+ \(95% interval \d+\.\d+ to \d+\.\d+\), and last in flask B, at hour \d+\.\d+ \(\d+\.\d+ to \d+\.\d+\); the first period at which all 3 are at or past it is hour 15; for a new flask, with the scatter between the 3 added, the 95% interval is /,
    );
  });

  test("a new flask's interval has the scatter between flasks added: mean +- t(n - 1) sd sqrt(1 + 1/n)", () => {
    const times = found.groups.map((group) => group.time!);
    const mean = (times[0]! + times[1]! + times[2]!) / 3;
    const sd = Math.sqrt(times.reduce((sum, time) => sum + (time - mean) ** 2, 0) / 2);
    // Source: t(2) at 0.975 is 4.302653 (handbook table, 4.303).
    expect(found.across!.newUpper).toBeCloseTo(mean + 4.302653 * sd * Math.sqrt(4 / 3), 4);
    expect(found.across!.meanUpper).toBeCloseTo(mean + (4.302653 * sd) / Math.sqrt(3), 4);
    const widest = Math.max(...found.groups.map((group) => group.upper! - group.lower!));
    expect(found.across!.newUpper - found.across!.newLower).toBeGreaterThan(widest);
  });
});

test("between two periods a geometric, an affine and a Beverton-Holt path lie on their closed forms", () => {
  // Source: the closed forms x0 R^t, x* + (x0 - x*) a^t and K N0/(N0 + (K - N0) R^-t), each at t = 3.37. Tolerance: rounding.
  const cases = [
    ["x[t+1] = 1.2*x", 10, 10 * 1.2 ** 3.37],
    ["x[t+1] = 0.7*x + 30", 10, 100 - 90 * 0.7 ** 3.37],
    ["x[t+1] = 1.5*x/(1 + 0.5*x/80)", 10, (80 * 10) / (10 + 70 * 1.5 ** -3.37)],
    ["x[t+1] = x + 4", 10, 10 + 4 * 3.37],
  ] as const;
  for (const [text, x, value] of cases) {
    const found = simulate(recurrence(text), { initial: { x }, periods: 8 });
    expect(timeToReach(found, { risesTo: value }).groups[0]!.time).toBeCloseTo(3.37, 9);
  }
});

describe("a loan recorded by month ends", () => {
  const dates = ["2026-08-31", "2026-09-30", "2026-10-31", "2026-11-30", "2026-12-31", "2027-01-31"];
  const owed = [6000, 5530.02, 5054.61, 4573.75, 4087.33, 3595.36];
  const loan = observations(tableOf({ date: dates, owed }), {
    period: "date",
    step: "month-end",
    value: "owed",
    unit: "crowns",
  });
  const fitted = fit(recurrence("owed[t+1] = owed*(1 + i) - p"), loan, { errors: "process" });
  const ahead = forecast(fitted, { periods: 12, paths: 400 });

  test("is answered for in dates", () => {
    expect(ahead.groups[0]!.labels!.slice(0, 3)).toEqual(["2027-01-31", "2027-02-28", "2027-03-31"]);
    const found = timeToReach(ahead, { fallsTo: 3000 });
    expect(found.groups[0]!.words.time).toBe("between 2027-02-28 and 2027-03-31");
    expect(found.sentence).toMatch(
      /^The value of owed reaches 3000 crowns between 2027-02-28 and 2027-03-31 \(95% interval 2027-02-28 to 2027-03-31\); the first period at or past it is 2027-03-31, provided it goes on as in the record of 6 values to 2027-01-31, by the rule /,
    );
  });

  test("that begins past the value asked for gets no date", () => {
    const found = timeToReach(ahead, { fallsTo: 7000 });
    expect(found.groups[0]!.time).toBeUndefined();
    expect(found.groups[0]!.beginsPast).toBe(true);
    expect(found.sentence).toMatch(
      /^The value of owed is at or below 7000 crowns from the first row on, so there is no time at which it gets there \(was `risesTo` meant\?\), provided .*\.$/,
    );
  });

  test("that passed the value in the record is said to have", () => {
    expect(timeToReach(ahead, { fallsTo: 5000 }).sentence).toMatch(
      /^The value of owed is already recorded at or past 5000 crowns, at 2026-11-30/,
    );
  });
});

test("dates go by days and weeks, and by months that keep their day", () => {
  const at = (dates: readonly string[], step: "week" | "month" | "quarter"): readonly string[] => {
    const record = observations(tableOf({ date: [...dates], x: dates.map((_, i) => 10 + i + (i % 2)) }), {
      period: "date",
      step,
      value: "x",
    });
    const fitted = fit(recurrence("x[t+1] = x + c"), record, { errors: "process" });
    return forecast(fitted, { periods: 2, paths: 10 }).groups[0]!.labels!;
  };
  expect(at(["2026-02-16", "2026-02-23", "2026-03-02", "2026-03-09", "2026-03-16"], "week")).toEqual([
    "2026-03-16",
    "2026-03-23",
    "2026-03-30",
  ]);
  expect(at(["2025-08-15", "2025-09-15", "2025-10-15", "2025-11-15", "2025-12-15"], "month")).toEqual([
    "2025-12-15",
    "2026-01-15",
    "2026-02-15",
  ]);
  expect(at(["2025-03-31", "2025-06-30", "2025-09-30", "2025-12-31", "2026-03-31"], "quarter")).toEqual([
    "2026-03-31",
    "2026-06-30",
    "2026-09-30",
  ]);
});

test("questions that cannot be asked are refused", () => {
  const found = simulate(recurrence("x[t+1] = x + 1"), { initial: { x: 0 }, periods: 3 });
  expect(() => timeToReach(found, { state: "y", risesTo: 1 })).toThrow(
    'The projection has no state or quantity "y". It has: x.',
  );
  expect(() => timeToReach(found, { risesTo: Number.NaN })).toThrow(
    "The level of x must be a finite number; NaN was given.",
  );
  expect(() => timeToReach(found, { risesTo: 1, level: 95 })).toThrow(
    "An interval has a level between 0 and 1, such as 0.95; 95 was given.",
  );
});

test("a path that leaves an unstable equilibrium slowly is not said to level off", () => {
  // ΔN = r N (1 - N/K) has the multiplier 1 + r > 1 at 0: every move away from it is larger than the one before.
  const rule = recurrence("ΔN = r*N*(1 - N/K)", { fixed: { r: 0.0005, K: 1 } });
  const away = timeToReach(simulate(rule, { initial: { N: 1e-6 }, periods: 6 }), { risesTo: 0.9 });
  expect(away.groups[0]!.tendsTo).toBeUndefined();
  const settled = timeToReach(simulate(rule, { parameters: { r: 0.8 }, initial: { N: 0.5 }, periods: 30 }), {
    risesTo: 2,
  });
  expect(settled.groups[0]!.tendsTo?.value).toBeCloseTo(1, 6);
});
