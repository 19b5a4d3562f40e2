import { expect, test } from "vitest";
import { normalCdf, normalQuantile } from "../../src/numeric/index.js";
import { simulate } from "../../src/projection/index.js";
import { recurrence } from "../../src/rule/index.js";

const paths = 20_000;

/** Monte-Carlo standard error of a sample quantile of a normal value: sqrt(p(1-p)/n)/density. */
function quantileError(p: number, sd: number): number {
  const z = normalQuantile(p);
  const density = Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI) / sd;
  return Math.sqrt((p * (1 - p)) / paths) / density;
}

test("an affine rule with normal noise meets its exact predictive distribution at every period", () => {
  // Source: x_t is normal with mean a^t x0 + b(1-a^t)/(1-a) and variance sd^2 (1-a^(2t))/(1-a^2); Box and Jenkins (1970), section
  // 3.2 (from memory). Tolerance: four and a half Monte-Carlo errors, over 20 periods x 7 numbers.
  const [a, b, x0, sd] = [0.8, 30, 100, 4];
  const found = simulate(recurrence("x[t+1] = a*x + b"), {
    parameters: { a, b },
    initial: { x: x0 },
    periods: 20,
    noise: { x: { distribution: "normal", sd } },
    paths,
    seed: 11,
  });
  const [state] = found.groups[0]!.states;
  for (let t = 1; t <= 20; t++) {
    const mean = a ** t * x0 + (b * (1 - a ** t)) / (1 - a);
    const spread = sd * Math.sqrt((1 - a ** (2 * t)) / (1 - a * a));
    expect(Math.abs(state!.central[t]! - mean)).toBeLessThan(1e-11 * mean);
    expect(Math.abs(state!.median[t]! - mean)).toBeLessThan(4.5 * quantileError(0.5, spread));
    for (const band of state!.bands) {
      const p = (1 + band.level) / 2;
      const half = normalQuantile(p) * spread;
      expect(Math.abs(band.upper[t]! - mean - half)).toBeLessThan(4.5 * quantileError(p, spread));
      expect(Math.abs(band.lower[t]! - mean + half)).toBeLessThan(4.5 * quantileError(p, spread));
    }
  }
});

test("a lognormal multiplier of mean 1 grows by E ln R, not by ln E R", () => {
  // Source: ln x_T - ln x_0 is normal with mean T(ln R - sd^2/2) and variance T sd^2; Lewontin and Cohen (1969), PNAS 62:1056
  // (from memory). The mean of x_T stays R^T x_0.
  const [R, sd, periods] = [1.02, 0.3, 25];
  const found = simulate(recurrence("x[t+1] = R*x"), {
    parameters: { R },
    initial: { x: 1 },
    periods,
    noise: { x: { distribution: "lognormal", sd, centre: "mean" } },
    paths,
    seed: 5,
  });
  const logs = Array.from({ length: paths }, (_, k) =>
    Math.log(found.groups[0]!.ensemble.future[0]![k * (periods + 1) + periods]!),
  );
  const mean = logs.reduce((sum, value) => sum + value, 0) / paths / periods;
  const error = (sd * Math.sqrt(periods)) / periods / Math.sqrt(paths);
  expect(Math.abs(mean - (Math.log(R) - sd ** 2 / 2))).toBeLessThan(4.5 * error);
  const growth = found.groups[0]!.states[0]!.growth!;
  expect(growth.rate).toBeCloseTo(mean, 10);
  expect(growth.error).toBeCloseTo(error, 4);
  // The mean of x_T has relative standard deviation sqrt(exp(T sd^2) - 1) = 2.9: its log over 25 periods errs by .0008.
  expect(Math.abs(growth.ofMean - Math.log(R))).toBeLessThan(4.5 * 0.0009);
  expect(found.groups[0]!.warnings[0]!.message).toMatch(
    /^x grows by -2\.\d\d% a period along a typical path \(E ln R, Monte-Carlo error 0\.0\d%\), and by \d\.\d\d% in the mean, which few lucky paths carry: read the median\.$/,
  );
  const median = found.groups[0]!.states[0]!.median[periods]!;
  expect(Math.abs(Math.log(median) / periods - (Math.log(R) - sd ** 2 / 2))).toBeLessThan(6 * error);
});

test("a walk in unit normal steps passes a level by n with the exact probability of a small case", () => {
  // P(no passage of 0 from 1 in one step) = Phi(1); watched passages and kept paths tell the same.
  const found = simulate(recurrence("x[t+1] = x + c"), {
    parameters: { c: 0 },
    initial: { x: 1 },
    periods: 1,
    noise: { x: { distribution: "normal", sd: 1 } },
    paths,
    watch: [{ fallsTo: 0 }],
  });
  const passed = found.groups[0]!.passages[0]!.at.filter(Number.isFinite).length / paths;
  const exact = 1 - normalCdf(1);
  expect(Math.abs(passed - exact)).toBeLessThan(4.5 * Math.sqrt((exact * (1 - exact)) / paths));
});

test.each([
  ["poisson", { distribution: "poisson" } as const, 60, 60],
  ["poisson of a small mean", { distribution: "poisson" } as const, 3, 3],
  ["negative binomial", { distribution: "negative-binomial", size: 4 } as const, 12, 12 + 144 / 4],
  ["demographic", { distribution: "demographic", variance: 2 } as const, 50, 100],
  [
    "lognormal",
    { distribution: "lognormal", sd: 0.4, centre: "mean" } as const,
    10,
    100 * (Math.exp(0.16) - 1),
  ],
])("noise of family %s has the mean and the variance of its distribution", (_, noise, mean, variance) => {
  // Source: moments of the named distributions (Johnson, Kotz and Kemp, Univariate Discrete Distributions; from memory).
  const found = simulate(recurrence("x[t+1] = m"), {
    parameters: { m: mean },
    initial: { x: mean },
    periods: 1,
    noise: { x: noise },
    paths,
    seed: 3,
  });
  const values = Array.from({ length: paths }, (_, k) => found.groups[0]!.ensemble.future[0]![2 * k + 1]!);
  const average = values.reduce((sum, value) => sum + value, 0) / paths;
  const square = values.reduce((sum, value) => sum + (value - average) ** 2, 0) / (paths - 1);
  expect(Math.abs(average - mean)).toBeLessThan(4.5 * Math.sqrt(variance / paths));
  // The relative error of a sample variance is sqrt((kurtosis - 1)/n); 6 covers the kurtosis of all five families.
  expect(Math.abs(square / variance - 1)).toBeLessThan(4.5 * Math.sqrt(6 / paths));
});

test("more periods leave the earlier numbers as they are, and more paths the earlier whole blocks", () => {
  const rule = recurrence("x[t+1] = 0.9*x");
  const run = (periods: number, paths: number) =>
    simulate(rule, { initial: { x: 1 }, periods, paths, noise: { x: { distribution: "normal", sd: 1 } } })
      .groups[0]!.ensemble.future[0]!;
  const small = run(5, 1500);
  const long = run(9, 1500);
  const many = run(5, 4000);
  for (let path = 0; path < 1024; path += 7) {
    expect(many[path * 6 + 5]).toBe(small[path * 6 + 5]);
    expect(long[path * 10 + 5]).toBe(small[path * 6 + 5]);
  }
});

test("schedules and one-off events reach the periods they name, and scenarios share random numbers", () => {
  const loan = recurrence("owed[t+1] = owed - payment[t+1]", { inputs: ["payment"] });
  const found = simulate(loan, {
    initial: { owed: 1000 },
    periods: 6,
    scenarios: {
      usual: { payment: 100 },
      missed: { payment: { usual: 100, from: { 4: 150 }, at: { 2: 0 } } },
      listed: { payment: [0, 1, 2, 3, 4, 5, 6] },
    },
    noise: { owed: { distribution: "normal", sd: 1 } },
    paths: 50,
  });
  const central = found.groups.map((group) => group.states[0]!.central);
  expect(central[0]).toEqual([1000, 900, 800, 700, 600, 500, 400]);
  expect(central[1]).toEqual([1000, 900, 900, 800, 650, 500, 350]);
  expect(central[2]).toEqual([1000, 999, 997, 994, 990, 985, 979]);
  const [usual, missed] = found.groups.map((group) => group.ensemble.future[0]!);
  for (let path = 0; path < 50; path++)
    expect(missed![path * 7 + 3]! - usual![path * 7 + 3]!).toBeCloseTo(100, 9);
});

test("a path that passes a bound stays there, or stops where that is an error; both are said with the period", () => {
  // Source: 100 less 30 a period, by subtraction.
  const run = { parameters: { C: 30 }, initial: { B: 100 }, periods: 6 };
  const gone = simulate(recurrence("B[t+1] = B - C", { bounds: { B: [0, Infinity] } }), run);
  expect(gone.groups[0]!.states[0]!.central).toEqual([100, 70, 40, 10, 0, 0, 0]);
  expect(gone.groups[0]!.warnings.map((w) => w.message)).toEqual([
    "B reaches its bound 0 at period 4 and stays there.",
  ]);
  const rule = recurrence("B[t+1] = B - C", {
    bounds: { B: { range: [0, Infinity], atBounds: "error" } },
  });
  const found = simulate(rule, run);
  expect(found.groups[0]!.states[0]!.central).toEqual([100, 70, 40, 10, Number.NaN, Number.NaN, Number.NaN]);
  expect(found.groups[0]!.warnings.map((w) => w.message)).toEqual([
    "At period 4 the rule gives B = -20, outside its range; the path without random change stops at period 3.",
  ]);
});

test("a run says how far it is, and ends where it is told to", () => {
  const told: number[] = [];
  const run = (stopAt: number) => () =>
    simulate(recurrence("x[t+1] = 0.9*x"), {
      initial: { x: 1 },
      periods: 9,
      noise: { x: { distribution: "normal", sd: 1 } },
      paths: 3000,
      onProgress: (done, of) => {
        told.push(done / of);
        if (told.length === stopAt) throw new Error("stopped by the reader");
      },
    });
  expect(run(Infinity)()).toHaveProperty("kind", "simulation");
  expect(told).toHaveLength(30);
  expect([...told].sort((a, b) => a - b)).toEqual(told);
  expect(told.at(-1)).toBe(1);
  told.length = 0;
  expect(run(7)).toThrow("stopped by the reader");
  expect(told).toHaveLength(7);
});

test("what cannot be run is refused in a whole sentence", () => {
  const loan = recurrence("owed[t+1] = owed - payment[t+1]", { inputs: ["payment"] });
  const run = (options: object) => () => simulate(loan, { initial: { owed: 1 }, periods: 3, ...options });
  expect(run({})).toThrow(
    "The rule needs payment for the next 4 periods; supply a scenario, such as inputs: { payment: { usual: 0 } }.",
  );
  expect(run({ inputs: { paymant: 1 } })).toThrow(
    'The rule has no input "paymant". It has: payment. Did you mean "payment"?',
  );
  expect(run({ inputs: { payment: [1, 2] } })).toThrow(
    "Invalid plan for `payment`: it has 2 values and the projection needs 4. Give one for each period, or { usual, from, at }.",
  );
  expect(run({ inputs: { payment: { usual: 1, at: { 9: 0 } } } })).toThrow(
    "Invalid plan for `payment`: `at` speaks of 9, and the projection runs from 0 to 3: 9 lies outside it.",
  );
  expect(run({ periods: 0 })).toThrow(
    "A projection runs over a whole number of periods, at least 1; 0 was given.",
  );
  expect(run({ inputs: { payment: 1 }, levels: [95] })).toThrow(
    "A band has a level between 0 and 1, such as 0.95; 95 was given.",
  );
  expect(run({ inputs: { payment: 1 }, noise: { owed: { distribution: "normal", sd: -1 } } })).toThrow(
    "The random change of owed cannot be drawn: its sd is -1, which is not positive.",
  );
  expect(run({ inputs: { payment: 1 }, scenarios: { a: { payment: 1 } } })).toThrow(
    "Both inputs and scenarios were given. Put what all scenarios share into each of them, and leave inputs out.",
  );
});
