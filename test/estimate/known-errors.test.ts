// Known standard deviations: one number, or a column of them.
import { describe, expect, test } from "vitest";
import { type Fit, type FitOptions, fit } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { forecast } from "../../src/projection/index.js";
import { recurrence, rules } from "../../src/rule/index.js";
import { record } from "./record.js";

const value = (fitted: Fit, name: string): number =>
  fitted.groups[0]!.estimates.find((each) => each.name === name)!.value;
const error = (fitted: Fit, name: string): number =>
  fitted.groups[0]!.estimates.find((each) => each.name === name)!.standardError!;

describe("a column of standard deviations", () => {
  const N = [10.2, 12.1, 13.9, 17.8, 20.4, 25.9, 29.7];
  const cv = [0.1, 0.1, 0.2, 0.2, 0.3, 0.3, 0.3];
  const options: FitOptions = { errors: "observation", distribution: "lognormal", sd: "cv" };

  // Source: NumPy 2.4.6, weighted least squares of ln N on time with weights 1/cv^2, covariance (X'WX)^-1; twelve digits.
  test("is weighted least squares with known variances", () => {
    const fitted = fit(recurrence("N[t+1] = R*N"), record({ N, cv }, { inputNames: ["cv"] }), options);
    expect(Math.log(value(fitted, "R"))).toBeCloseTo(0.180235256181, 9);
    expect(error(fitted, "R") / value(fitted, "R")).toBeCloseTo(0.0367822603231, 7);
    expect(fitted.warnings).toEqual([]);
    expect(fitted.conventions.join(" ")).toContain('column "cv"');
  });

  test("the scatter of a future reading is their root mean square", () => {
    const fitted = fit(recurrence("N[t+1] = R*N"), record({ N, cv }, { inputNames: ["cv"] }), options);
    const [group] = forecast(fitted, { periods: 1, paths: 20_000, levels: [0.95] }).groups;
    const band = group!.states[0]!.bands.find(({ kind }) => kind === "future observation")!;
    const mean = group!.states[0]!.bands.find(({ kind }) => kind === "mean path")!;
    const half = (each: { lower: ArrayLike<number>; upper: ArrayLike<number> }): number =>
      (Math.log(each.upper[7]!) - Math.log(each.lower[7]!)) / 2 / 1.959964;
    const rms = Math.sqrt(cv.reduce((sum, each) => sum + each * each, 0) / cv.length);
    // 20,000 paths give a half width to about 1%; the parameters' own t band is a little wider than a normal one.
    expect(half(band) / Math.hypot(half(mean), rms)).toBeGreaterThan(0.95);
    expect(half(band) / Math.hypot(half(mean), rms)).toBeLessThan(1.05);
  });

  test("is refused where the record does not hold it, or a row has none", () => {
    const rule = recurrence("N[t+1] = R*N");
    expect(() => fit(rule, record({ N }), options)).toThrow(
      expect.objectContaining({ code: "sd-not-recorded", message: expect.stringContaining("`sd: 0.15`") }),
    );
    const gap = [...cv.slice(0, 6), Number.NaN];
    expect(() => fit(rule, record({ N, cv: gap }, { inputNames: ["cv"] }), options)).toThrow(
      expect.objectContaining({ code: "invalid-sd", message: expect.stringMatching(/^Row 7/) }),
    );
  });
});

describe("a filter", () => {
  const x = [2.1, 1.4, 3.2, 2.8, 1.1, 2.6, 2.2, 3.9];
  const sd = [0.3, 0.3, 0.6, 0.3, 0.9, 0.3, 0.6, 0.3];
  const rule = recurrence("x[t+1] = c + b*x");

  // Source: the joint normal density of the readings, worked out below: mean c/(1-b), covariance q b^|i-j|/(1-b^2) plus the
  // reading variances on the diagonal.
  test("takes each reading with its own standard deviation", () => {
    const options: FitOptions = { errors: "both", sd: "sd", fixed: { c: 1.2, b: 0.5 }, intervals: "none" };
    const fitted = fit(rule, record({ x, sd }, { inputNames: ["sd"] }), options);
    const variance = value(fitted, "process error") ** 2;
    expect(fitted.groups[0]!.filter!.start).toBe("stationary");
    expect(fitted.criteria.logLikelihood).toBeCloseTo(jointLogLikelihood(x, sd, 1.2, 0.5, variance), 8);
  });

  test("takes the first reading with its weight too, from a diffuse start", () => {
    // The rule reads the period, so it is filtered from the first reading, whose error counts by its weight.
    const walk = recurrence("x[t+1] = x + 0*t");
    const weights = Float64Array.of(4, 1, 1, 1, 1, 1, 1, 1);
    const options: FitOptions = { errors: "both", sd: 0.5, intervals: "none" };
    const fitted = fit(walk, record({ x }, { weights }), options);
    const variance = value(fitted, "process error") ** 2;
    // By hand: the state begins at the first reading with variance 0.25/4, then the Kalman recursions of a random walk.
    let [mean, spread, sum] = [x[0]!, 0.25 / 4, 0];
    for (const reading of x.slice(1)) {
      spread += variance;
      const total = spread + 0.25;
      sum -= 0.5 * (Math.log(2 * Math.PI * total) + (reading - mean) ** 2 / total);
      mean += (spread / total) * (reading - mean);
      spread -= (spread * spread) / total;
    }
    expect(fitted.criteria.logLikelihood).toBeCloseTo(sum, 8);
  });
});

test("a record that separates the two errors only weakly is forecast all the same, and the remedy exists", () => {
  const stream = randomStream(21);
  const N: number[] = [];
  for (let t = 0, u = 3; t < 60; t++) {
    N.push(Math.exp(u + 0.1 * stream.normal()));
    u = 1.2 + 0.6 * u + 0.2 * stream.normal();
  }
  const both: FitOptions = { errors: "both", distribution: "lognormal" };
  const open = fit(rules.gompertz(), record({ N }), both);
  const weak = open.groups[0]!.estimates.some(
    ({ role, standardError }) => role === "scale" && standardError === undefined,
  );
  const ahead = forecast(open, { periods: 5, paths: 500 }).groups[0]!;
  expect(ahead.warnings.some(({ code }) => code === "spreads-held")).toBe(weak);
  const held = fit(rules.gompertz(), record({ N }), { ...both, sd: 0.1 });
  expect(held.groups[0]!.estimates.map(({ name }) => name)).not.toContain("observation error");
  expect(Object.values(held.groups[0]!.filter!.observationError)).toEqual([0.1]);
  expect(
    forecast(held, { periods: 5, paths: 500 }).groups[0]!.warnings.map(({ code }) => code),
  ).not.toContain("spreads-held");
});

test("a check by particles that came to nothing is said", () => {
  const stream = randomStream(2);
  const N = [20];
  for (let t = 1; t < 25; t++)
    N.push(N[t - 1]! * Math.exp(0.5 * (1 - N[t - 1]! / 100) + 0.3 * stream.normal()));
  const exact: FitOptions = { errors: "both", distribution: "lognormal", sd: 1e-9 };
  const fitted = fit(recurrence("N[t+1] = N*exp(r*(1 - N/K))"), record({ N }), exact);
  const { check } = fitted.groups[0]!.filter!;
  expect(check).toMatchObject({ particles: undefined, lost: 4, of: 4 });
  expect(fitted.conventions.join(" ")).toContain("Particles could not check the filter");
});

/** Log density of readings of a stationary first-order autoregression, each with its own error, by elimination. */
function jointLogLikelihood(
  x: readonly number[],
  sd: readonly number[],
  c: number,
  b: number,
  variance: number,
): number {
  const rows = x.map((reading, i) => [
    ...x.map((_, j) => (variance * b ** Math.abs(i - j)) / (1 - b * b) + (i === j ? sd[i]! * sd[i]! : 0)),
    reading - c / (1 - b),
  ]);
  let sum = 0;
  for (let i = 0; i < rows.length; i++) {
    const pivot = rows[i]![i]!;
    sum += Math.log(2 * Math.PI * pivot) + rows[i]![rows.length]! ** 2 / pivot;
    for (let j = i + 1; j < rows.length; j++) {
      const factor = rows[j]![i]! / pivot;
      for (let k = i; k <= rows.length; k++) rows[j]![k] = rows[j]![k]! - factor * rows[i]![k]!;
    }
  }
  return -0.5 * sum;
}
