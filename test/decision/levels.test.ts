// Levels relative to a parameter or the start, of states and of quantities.
import { describe, expect, test } from "vitest";
import { solveFor, timeToReach, tradeoff } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { recurrence } from "../../src/rule/index.js";
import { cultureRecord } from "./harbour-records.js";

const growth = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", {
  bounds: { R: [1, Number.POSITIVE_INFINITY], K: [0, Number.POSITIVE_INFINITY] },
});

describe("a share of the carrying capacity", () => {
  const fitted = fit(growth, cultureRecord(14), { errors: "observation", distribution: "lognormal" });
  const ahead = forecast(fitted, { periods: 60, paths: 2000 });
  const { R, K } = fitted.groups[0]!.parameters as { R: number; K: number };
  const start = fitted.groups[0]!.estimates.find(({ name }) => name === "N[0]")!.value;
  /** Source: the closed form of the Beverton-Holt rule, t = ln(A(K - N0)/(N0(K - A)))/ln R periods of half an hour. */
  const hours = (level: number, rate: number, capacity: number, initial: number): number =>
    Math.log((level * (capacity - initial)) / (initial * (capacity - level))) / Math.log(rate) / 2;

  test("is reached when the closed form says", () => {
    const [group] = timeToReach(ahead, { risesTo: { share: 0.9, of: "K" } }).groups;
    expect(group!.levelAt).toBeCloseTo(0.9 * K, 12);
    expect(group!.time!).toBeCloseTo(hours(0.9 * K, R, K, start), 6);
  });

  test("is reached by every draw against its own capacity, and so by nearly all and within a shorter interval", () => {
    const own = timeToReach(ahead, { risesTo: { share: 0.9, of: "K" } });
    const one = timeToReach(ahead, { risesTo: 0.9 * K });
    expect(own.groups[0]!.never).toBe(0);
    expect(one.groups[0]!.never).toBeGreaterThan(0.1);
    const [low, high] = [own.groups[0]!.lower!, own.groups[0]!.upper!];
    expect(high - low).toBeLessThan(
      (one.groups[0]!.upper ?? Number.POSITIVE_INFINITY) - one.groups[0]!.lower!,
    );
    expect(own.sentence).toMatch(/^N reaches 90% of K \(1\.\d+\) at hour /);
    // Source: the closed form at each draw's own values.
    const { levels, paths } = ahead.groups[0]!.ensemble;
    const times = Float64Array.from({ length: paths }, (_, k) => {
      const [rate, capacity] = levels.paths.parameters.subarray(2 * k, 2 * k + 2);
      return hours(0.9 * capacity!, rate!, capacity!, levels.paths.initial[k]!);
    }).sort();
    expect(low).toBeCloseTo(times[Math.round(0.025 * (paths - 1))]!, 1);
    expect(high).toBeCloseTo(times[Math.round(0.975 * (paths - 1))]!, 1);
  });

  test("moves with a capacity that is set", () => {
    const { rows } = tradeoff(growth, {
      vary: "K",
      values: [50, 100, 200],
      parameters: { R: 2, K: 100 },
      initial: { N: 10 },
      periods: 30,
      answers: { half: { time: "N", risesTo: { share: 0.5, of: "K" } } },
    });
    // Source: at half the capacity the closed form is log2(K/N0 - 1).
    rows.forEach(({ value, answers }) => {
      expect(answers["half"]).toBeCloseTo(Math.log2(value / 10 - 1), 9);
    });
  });
});

describe("a number of log10 reductions of the start", () => {
  const decline = recurrence("N[t+1] = s*N");
  const asked = { parameters: { s: 0.5 }, initial: { N: 4e6 }, periods: 30 } as const;

  test("is reached after logs/log10(1/s) periods", () => {
    // Source: s^t = 10^-6 at t = 6/log10(2).
    const [group] = timeToReach(simulate(decline, asked), { fallsTo: { logs: 6, of: "N[0]" } }).groups;
    expect(group!.time!).toBeCloseTo(6 / Math.log10(2), 9);
    expect(group!.levelAt).toBeCloseTo(4, 9);
    expect(group!.sentence).toMatch(/^N reaches 6 log10 below N\[0\] \(4\) at period 19\.93/);
  });

  test("asks for the same survival whatever the start", () => {
    const found = solveFor(decline, {
      ...asked,
      vary: "s",
      range: [0.1, 0.9],
      until: { time: "N", fallsTo: { logs: 6, of: "N[0]" }, is: 10 },
    });
    // Source: s = 10^(-6/10).
    expect(found.solutions[0]!.value).toBeCloseTo(10 ** -0.6, 9);
  });

  test("of a name that the rule has not is refused", () => {
    expect(() => timeToReach(simulate(decline, asked), { fallsTo: { logs: 6, of: "M[0]" } })).toThrow(
      'A level is taken of a parameter or a first value, and there is no "M[0]". There are: s, N[0]. Did you mean "N[0]"?',
    );
  });
});

describe("a quantity of the rule", () => {
  const rule = recurrence("share = N/K\nΔN = r*N*(1 - N/K)");
  const asked = {
    parameters: { r: 0.5, K: 100 },
    initial: { N: 20 },
    periods: 6,
    noise: { N: { distribution: "lognormal", sd: 0.1 } },
    paths: 1000,
  } as const;

  test("is reached one period after the state that it is read from, as it belongs to the period that follows", () => {
    const run = simulate(rule, asked);
    const state = timeToReach(run, { state: "N", risesTo: 50 }).groups[0]!;
    const quantity = timeToReach(run, { state: "share", risesTo: 0.5 }).groups[0]!;
    expect(quantity.time!).toBeGreaterThan(state.firstPeriod! - 1);
    expect(quantity.firstPeriod).toBe(state.firstPeriod! + 1);
  });

  test("has the same probability in every function", () => {
    const { never } = timeToReach(simulate(rule, asked), { state: "share", risesTo: 0.5 }).groups[0]!;
    const { rows } = tradeoff(rule, {
      ...asked,
      vary: "r",
      values: [0.5],
      answers: { a: { probability: "share", risesTo: 0.5 } },
    });
    expect(rows[0]!.answers["a"]).toBeCloseTo(1 - never, 12);
    expect(rows[0]!.answers["a"]).toBeGreaterThan(0.5);
  });

  test("is watched where paths are too many to keep", () => {
    const watch = [{ state: "share", risesTo: 0.5 }] as const;
    const many = simulate(rule, { ...asked, paths: 400_000, watch });
    expect(many.groups[0]!.ensemble.process).toHaveLength(0);
    const { never } = timeToReach(many, watch[0]).groups[0]!;
    const few = timeToReach(simulate(rule, asked), watch[0]).groups[0]!;
    expect(Math.abs(never - few.never)).toBeLessThan(4.5 * few.neverError);
  });
});

test("a level beyond the bounds of a state, none, or two at once are refused", () => {
  const rule = recurrence("B[t+1] = B - C", { bounds: { B: [0, Number.POSITIVE_INFINITY] } });
  const run = simulate(rule, { parameters: { C: 1 }, initial: { B: 5 }, periods: 3 });
  expect(() => timeToReach(run, { fallsTo: -5 })).toThrow(
    "B cannot reach -5: the rule bounds it to 0 to Infinity. Ask for a level within them, or give the rule other `bounds`.",
  );
  expect(() => timeToReach(run, {} as never)).toThrow(
    "Which level of B? Give one of `risesTo` and `fallsTo`, as in { risesTo: 120 } or { fallsTo: 0 }.",
  );
  expect(() => timeToReach(run, { risesTo: 1, fallsTo: 2 } as never)).toThrow("Which level of B?");
});
