// One question, one answer: levels reached, or not, through every function that can be asked.
import { describe, expect, test } from "vitest";
import { optimize, solveFor, timeToReach, tradeoff } from "../../src/decision/index.js";
import { fit } from "../../src/estimate/index.js";
import { forecast, simulate } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence, rules } from "../../src/rule/index.js";
import { readColumns } from "../published/read-columns.js";

const zero = [0, Number.POSITIVE_INFINITY] as const;

describe("a debt that is paid off between two months", () => {
  const owed = [5000];
  for (let i = 0, balance = 5000; i < 12; i++) {
    balance = balance * 1.01 - 300 + (((i * 7) % 3) - 1) * 2;
    owed.push(Number(balance.toFixed(2)));
  }
  const record = observations(tableOf({ month: owed.map((_, i) => i), owed }), {
    period: "month",
    step: { every: 1, of: "month" },
    value: "owed",
    unit: "EUR",
  });
  const ask = (options: Parameters<typeof recurrence>[1]) => {
    const fitted = fit(recurrence("owed[t+1] = owed*(1 + i) - p", options), record, {
      errors: "observation",
    });
    const [group] = timeToReach(forecast(fitted, { periods: 24 }), { fallsTo: 0 }).groups;
    return {
      group: group!,
      estimates: fitted.groups[0]!.parameters,
      start: fitted.groups[0]!.initial["owed"],
    };
  };
  const bounded = ask({ bounds: { owed: zero } });
  const free = ask({});

  test("is paid off at the same time with and without a bound at 0", () => {
    // Source: B_t = (B0 - p/i)(1 + i)^t + p/i is 0 at t = ln((p/i)/(p/i - B0))/ln(1 + i). Tolerance: rounding.
    const { i, p } = free.estimates as { i: number; p: number };
    const exact = Math.log(p / i / (p / i - (free.start as number))) / Math.log(1 + i);
    expect(free.group.time!).toBeCloseTo(exact, 6);
    expect(bounded.group.time!).toBeCloseTo(exact, 6);
    expect(bounded.group.lower!).toBeCloseTo(free.group.lower!, 2);
    expect(bounded.group.upper!).toBeCloseTo(free.group.upper!, 2);
    expect(bounded.group.never).toBe(0);
  });
});

describe("the probability that a shelf runs out", () => {
  // Source: the density of the walk stepped on a grid of 0.01 in a general-purpose program, absorbed at 0. Tolerance:
  // 4.5 Monte-Carlo errors of 20,000 paths.
  const exact = [0.103396, 0.897385, 0.999927];
  test.each([{ bounds: { S: zero } }, {}, { bounds: { S: { range: zero, atBounds: "error" } } }] as const)(
    "is that of the walk, whatever its bound does (%j)",
    (options) => {
      const { rows } = tradeoff(recurrence("S[t+1] = S - d", options), {
        vary: "d",
        values: [8, 12, 16],
        parameters: { d: 8 },
        initial: { S: 100 },
        periods: 10,
        noise: { S: { distribution: "normal", sd: 5 } },
        paths: 20_000,
        answers: { out: { probability: "S", fallsTo: 0 } },
      });
      rows.forEach(({ answers }, i) => {
        const error = Math.sqrt((exact[i]! * (1 - exact[i]!)) / 20_000);
        expect(Math.abs(answers["out"]! - exact[i]!)).toBeLessThan(4.5 * error + 1e-4);
      });
    },
  );
});

describe("a branching of Poisson counts that begins with two", () => {
  // Source: generating functions: q1 = exp(-R), q2 = exp(R (q1 - 1)), and both lines die out with q squared. R 1: 0.135335,
  // 0.282454; R 0.5: 0.367879, 0.674712. Tolerance: 4.5 Monte-Carlo errors of 40,000 paths.
  const rule = recurrence("N[t+1] = R*N");
  const given = { initial: { N: 2 }, noise: { N: { distribution: "poisson" } }, paths: 40_000 } as const;
  const cases = [
    [1, 1, 0.135335],
    [1, 2, 0.282454],
    [0.5, 1, 0.367879],
    [0.5, 2, 0.674712],
  ] as const;

  test.each(cases)("with R %d dies out within %d periods with the exact probability", (R, periods, exact) => {
    const tolerance = 4.5 * Math.sqrt((exact * (1 - exact)) / 40_000);
    const asked = { ...given, parameters: { R }, periods };
    const { never } = timeToReach(simulate(rule, asked), { fallsTo: 0 }).groups[0]!;
    expect(Math.abs(1 - never - exact)).toBeLessThan(tolerance);
    const [row] = tradeoff(rule, {
      ...asked,
      vary: "R",
      values: [R],
      answers: { die: { probability: "N", fallsTo: 0 } },
    }).rows;
    expect(row!.answers["die"]).toBeCloseTo(1 - never, 12);
    const solved = solveFor(rule, {
      ...asked,
      vary: "R",
      range: [0.2, 3],
      until: { probability: "N", fallsTo: 0, is: exact },
    });
    expect(Math.abs(solved.solutions[0]!.value - R)).toBeLessThan(0.05);
    const best = optimize(rule, {
      ...asked,
      paths: 4000,
      vary: "R",
      range: [R, 3],
      maximize: { probability: "N", fallsTo: 0 },
    });
    expect(best.value).toBeLessThan(R + 0.15);
  });
});

describe("a harvested stock seen through an index", () => {
  const { year, catch_t, index_kg_per_haul } = readColumns("invented/catch-and-index.csv");
  const record = observations(tableOf({ year: year!, caught: catch_t!, index: index_kg_per_haul! }), {
    period: "year",
    step: { every: 1, of: "year" },
    values: { B: "index" },
    inputs: { C: "caught" },
    unit: { B: "kg/haul" },
  });
  const fitted = fit(rules.schaefer({ inputs: ["C"], units: { B: "t" } }), record, {
    errors: "observation",
    distribution: "lognormal",
    factor: { B: "q" },
  });
  const collapse = { probability: "B", fallsTo: 100 } as const;
  const catches = [50, 100, 120, 140, 160, 200, 400, 900];
  const rows = tradeoff(fitted, {
    vary: "C",
    values: catches,
    periods: 15,
    paths: 1000,
    answers: { collapse, stock: { level: "B", at: 15 } },
  }).rows;

  test("collapses the likelier the more is caught, and surely under a catch that no stock can bear", () => {
    const chances = rows.map(({ answers }) => answers["collapse"]!);
    expect([...chances].sort((a, b) => a - b)).toEqual(chances);
    expect(chances[0]).toBeLessThan(0.01);
    // The largest catch that can be sustained is r K/4, 93 t; 200 t a year exceed it from any level.
    expect(chances.slice(-3)).toEqual([1, 1, 1]);
    expect(rows.at(-1)!.answers["stock"]).toBe(0);
  });

  test("has the same chance in the forecast as among the choices", () => {
    for (const [i, C] of catches.entries()) {
      if (i % 3 !== 0) continue;
      const ahead = forecast(fitted, { periods: 15, inputs: { C }, paths: 1000 });
      const { never } = timeToReach(ahead, { fallsTo: 100 }).groups[0]!;
      expect(1 - never).toBeCloseTo(rows[i]!.answers["collapse"]!, 12);
    }
  });

  test("has one safe limit, and one catch that ends it in a given year", () => {
    const asked = { vary: "C", periods: 15, range: [10, 900], paths: 1000 } as const;
    const safe = solveFor(fitted, { ...asked, until: { ...collapse, atMost: 0.1 } });
    expect(safe.solutions).toHaveLength(1);
    expect(safe.solutions[0]!.meets).toBe("this value and below");
    const gone = solveFor(fitted, { ...asked, until: { time: "B", fallsTo: 100, is: 2030 } });
    expect(gone.solutions).toHaveLength(1);
    expect(gone.solutions[0]!.value).toBeGreaterThan(safe.solutions[0]!.value);
  });

  test("is in its own unit, and the index in the index's", () => {
    const [group] = forecast(fitted, { periods: 5, inputs: { C: 80 } }).groups;
    const [state] = group!.states;
    const q = fitted.groups[0]!.estimates.find(({ name }) => name === "q")!.value;
    expect(state!.unit).toBe("t");
    expect(state!.bands.map(({ kind }) => kind)).toEqual(["mean path", "mean path", "mean path"]);
    expect(state!.observed).toMatchObject({ factor: "q", unit: "kg/haul" });
    state!.observed!.central.forEach((value, t) => {
      expect(value).toBeCloseTo(q * state!.central[t]!, 9);
    });
    // Source: with sigma s an observation lies within exp(-+1.96 s) of its median; the record's own last values are of that size.
    const band = state!.observed!.bands.find(({ level }) => level === 0.95)!;
    const last = index_kg_per_haul!.at(-1)!;
    expect(band.lower.at(-1)!).toBeLessThan(last);
    expect(band.upper.at(-1)!).toBeGreaterThan(0.8 * last);
    expect(band.upper.at(-1)!).toBeLessThan(3 * last);
    expect(
      timeToReach(forecast(fitted, { periods: 5, inputs: { C: 80 } }), { risesTo: 700 }).sentence,
    ).toContain("700 t");
  });
});
