import { describe, expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { normalQuantile, studentQuantile } from "../../src/numeric/index.js";
import { type Band, forecast } from "../../src/projection/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";

const paths = 40_000;
const recordOf = (values: readonly number[]) =>
  observations(tableOf({ t: values.map((_, t) => t), x: [...values] }), {
    period: "t",
    step: { every: 1, of: "year" },
    value: "x",
  });

/** Half width of a band, as a multiple of what a standard normal band of the level has. */
const spread = (bands: readonly Band[], kind: Band["kind"], at: number, level = 0.8): number => {
  const band = bands.find((each) => each.kind === kind && each.level === level)!;
  return (band.upper[at]! - band.lower[at]!) / 2 / normalQuantile((1 + level) / 2);
};

describe("log-linear growth from 24 increments", () => {
  // Increments of ln x of mean .03 and sd .06 exactly: n values on a normal pattern, centred and scaled.
  const n = 24;
  const pattern = Array.from({ length: n }, (_, i) => normalQuantile(((i * 7) % n) / n + 0.5 / n));
  const mean = pattern.reduce((sum, z) => sum + z, 0) / n;
  const scale = Math.sqrt(pattern.reduce((sum, z) => sum + (z - mean) ** 2, 0) / (n - 1));
  const logs = [Math.log(100)];
  for (const z of pattern) logs.push(logs[logs.length - 1]! + 0.03 + (0.06 * (z - mean)) / scale);
  const fitted = fit(
    recurrence("x[t+1] = R*x", { bounds: { R: [0, Infinity] } }),
    recordOf(logs.map(Math.exp)),
    {
      errors: "process",
      distribution: "lognormal",
    },
  );
  const ahead = forecast(fitted, { periods: 12, paths, seed: 9, levels: [0.8] });
  const { bands } = ahead.groups[0]!.states[0]!;

  test.each([
    [1, 0.061237, 0.06],
    [6, 0.164317, 0.146969],
    [12, 0.254558, 0.207846],
  ])("the predictive sd at %i periods is sqrt(h s^2 + h^2 s^2/n)", (h, predictive, process) => {
    // Source: g .03, s .06 known, n 24: predictive sd .061237, .164317, .254558; process only .06, .146969, .207846 (closed
    // form, printed to six digits). Here s is estimated on 23 degrees of freedom, so the bands are those of Student's t
    // times these. Monte-Carlo error of a band's width .5%; three of those.
    const logged = bands.map((band) => ({
      ...band,
      lower: band.lower.map(Math.log),
      upper: band.upper.map(Math.log),
    }));
    const widened = studentQuantile(0.9, n - 1) / normalQuantile(0.9);
    const parameters = Math.sqrt(predictive ** 2 - process ** 2);
    expect(spread(logged, "future observation", h) / (predictive * widened)).toBeCloseTo(1, 1.5);
    expect(spread(logged, "mean path", h) / (parameters * widened)).toBeCloseTo(1, 1.5);
  });

  test("bands without the parameters' error are too narrow by 18% at 12 periods", () => {
    // Source: .207846/.254558 = 0.8165, that is 18% narrower; with the error of s as well it is a little more.
    expect(1 - 0.207846 / 0.254558).toBeCloseTo(0.18, 2);
    const logged = bands.map((band) => ({
      ...band,
      lower: band.lower.map(Math.log),
      upper: band.upper.map(Math.log),
    }));
    expect(1 - 0.207846 / spread(logged, "future observation", 12)).toBeGreaterThan(0.17);
  });
});

test("a chaotic fit gives the share of positive exponents, ends its path at the horizon and keeps the band", () => {
  // A Ricker record with r near 2.9; the exponent of N' = N exp(r(1-N/K)) is positive there (May 1976, Nature 261:459).
  const values = [80];
  for (let t = 0; t < 24; t++) {
    const last = values[t]!;
    values.push(last * Math.exp(2.9 * (1 - last / 100) + 0.15 * Math.sin(1 + 5 * t)));
  }
  const rule = recurrence("N[t+1] = N*exp(r*(1 - N/K))");
  const fitted = fit(rule, { ...recordOf(values) }, { errors: "process", distribution: "lognormal" });
  const ahead = forecast(fitted, { periods: 40, paths: 1000 });
  const [group] = ahead.groups;
  const { chaotic, predictionHorizon: horizon, longRun } = group!.predictability!;
  expect(chaotic).toBeGreaterThan(0.5);
  expect(horizon).toBeGreaterThanOrEqual(1);
  expect(horizon).toBeLessThan(20);
  const { central, bands } = group!.states[0]!;
  expect(Number.isFinite(central[horizon!]!)).toBe(true);
  expect(central.slice(horizon! + 1).every(Number.isNaN)).toBe(true);
  expect(bands.every((band) => band.lower.every(Number.isFinite))).toBe(true);
  expect(longRun!.lower).toBeLessThan(longRun!.upper);
  expect(group!.warnings.find((w) => w.code === "chaotic")!.message).toMatch(
    /^Long-range point projection is meaningless when the exponent is positive; P\(exponent > 0\) = 0\.\d\d|1\.00/,
  );
});

test("growth without bound is not called chaos", () => {
  const fitted = fit(recurrence("x[t+1] = R*x"), recordOf([1, 1.32, 1.68, 2.2, 2.9, 3.6, 4.9, 6.1]), {
    errors: "process",
    distribution: "lognormal",
  });
  const [group] = forecast(fitted, { periods: 5, paths: 200 }).groups;
  expect(group!.predictability!.lyapunovExponent).toBeGreaterThan(0);
  expect(group!.predictability!.chaotic).toBe(0);
});

describe("a record that does not determine the capacity", () => {
  // Early growth only: 9 half-hours of a Beverton-Holt culture of capacity 1.5, inoculum .02, with 4% scatter.
  const noise = [0.021, -0.034, 0.012, 0.043, -0.028, -0.011, 0.037, -0.02, 0.009];
  const values = noise.map((z, t) => {
    const grown = 1.31 ** t;
    return ((1.5 * 0.02 * grown) / (1.5 + 0.02 * (grown - 1))) * Math.exp(z);
  });
  const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)", {
    bounds: { R: [1, Infinity], K: [0, Infinity] },
  });
  const fitted = fit(rule, recordOf(values), { errors: "observation", distribution: "lognormal" });

  test("is projected by draws along its profile, and the share left open is the profile's", () => {
    const K = fitted.groups[0]!.estimates.find((each) => each.name === "K")!;
    expect(K.profile.upper).toBeUndefined();
    const ahead = forecast(fitted, { periods: 30, paths: 4000, levels: [0.95] });
    const [group] = ahead.groups;
    expect(group!.warnings[0]!.message).toMatch(
      /does not determine K.*: parameters were drawn along the profile of K/,
    );
    const { bands } = group!.states[0]!;
    const mean = bands.find((band) => band.kind === "mean path")!;
    const last = mean.lower.length - 1;
    // The lower limit far ahead is the capacity's own lower profile limit; the upper one is still exponential growth.
    expect(mean.lower[last]! / K.profile.lower!).toBeGreaterThan(0.9);
    expect(mean.lower[last]! / K.profile.lower!).toBeLessThan(1.1);
    expect(mean.upper[last]!).toBeGreaterThan(50);
  });
});
