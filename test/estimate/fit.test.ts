import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Estimate, type Fit, fit, secondOpinion } from "../../src/estimate/index.js";
import { leastSquares, randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "./record.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const affine = recurrence("x[t+1] = a + b*x");
const values = [10.1, 13.4, 18.9, 24.3, 32.2, 40.5, 50.1, 58.2, 67.9, 74.8, 81.2, 86.3];

const of = (fitted: Fit, name: string, group = 0): Estimate =>
  fitted.groups[group]!.estimates.find((estimate) => estimate.name === name)!;
const near = (a: number | undefined, b: number, tolerance: number): void =>
  expect(Math.abs((a ?? Number.NaN) / b - 1)).toBeLessThan(tolerance);

/** The trajectory of the sheltered rule in closed form. */
const path = (R: number, K: number, first: number, t: number): number =>
  (K * first) / (first + (K - first) * R ** -t);

describe("a trajectory fit", () => {
  const fitted = fit(sheltered, record({ N: values }), { errors: "observation" });

  test("is the least-squares fit of the closed form", () => {
    const closed = leastSquares({
      residuals: ([R, K, first]) => values.map((value, t) => value - path(R!, K!, first!, t)),
      start: [1.4, 90, 10],
    });
    ["R", "K", "N[0]"].forEach((name, i) => {
      near(of(fitted, name).value, closed.estimates[i]!, 1e-9);
      near(of(fitted, name).standardError, closed.standardErrors[i]!, 1e-6);
    });
  });

  test("does not depend on the unit of the values", () => {
    fc.assert(
      fc.property(fc.integer({ min: -9, max: 9 }), (power) => {
        const scale = 10 ** power;
        const other = fit(sheltered, record({ N: values.map((v) => v * scale) }), { errors: "observation" });
        near(of(other, "R").value, of(fitted, "R").value, 1e-8);
        near(of(other, "K").profile.upper, of(fitted, "K").profile.upper! * scale, 1e-6);
      }),
      { seed: 5, numRuns: 12 },
    );
  });

  test("keeps a gap a gap: the closed form at the periods that were recorded", () => {
    const kept = [0, 1, 2, 5, 6, 7, 8, 10, 11];
    const holes = fit(sheltered, record({ t: kept, N: kept.map((t) => values[t]!) }), {
      errors: "observation",
    });
    const closed = leastSquares({
      residuals: ([R, K, first]) => kept.map((t) => values[t]! - path(R!, K!, first!, t)),
      start: [1.4, 90, 10],
    });
    near(of(holes, "K").value, closed.estimates[1]!, 1e-8);
  });

  test("holds what is given: fixed parameters, a known first value, bounds", () => {
    const fixed = fit(sheltered, record({ N: values }), {
      errors: "observation",
      fixed: { K: 100 },
      initial: { N: 10 },
    });
    expect(fixed.groups[0]!.estimates.map(({ name }) => name)).toEqual(["R"]);
    const closed = leastSquares({
      residuals: ([R]) => values.map((value, t) => value - path(R!, 100, 10, t)),
      start: [1.4],
    });
    near(of(fixed, "R").value, closed.estimates[0]!, 1e-9);
    const bounded = fit(sheltered, record({ N: values }), { errors: "observation", bounds: { K: [0, 90] } });
    expect(of(bounded, "K").value).toBe(90);
    expect(bounded.groups[0]!.warnings.map(({ code }) => code)).toContain("at-bound");
  });

  test("weighs rows: a weight of 2 is the row twice", () => {
    const weights = Float64Array.from(values, (_, t) => (t % 3 === 0 ? 2 : 1));
    const weighted = fit(sheltered, record({ N: values }, { weights }), { errors: "observation" });
    const twice = values.flatMap((_, t) => (t % 3 === 0 ? [t, t] : [t]));
    const closed = leastSquares({
      residuals: ([R, K, first]) => twice.map((t) => values[t]! - path(R!, K!, first!, t)),
      start: [1.4, 90, 10],
    });
    near(of(weighted, "K").value, closed.estimates[1]!, 1e-8);
  });

  test("takes a known standard deviation as it is", () => {
    const known = fit(sheltered, record({ N: values }), { errors: "observation", sd: 2 });
    near(of(known, "K").value, of(fitted, "K").value, 1e-8);
    near(of(known, "K").standardError, (of(fitted, "K").standardError! * 2) / fitted.groups[0]!.sigma, 1e-6);
  });

  test("reads an input in the step that it belongs to", () => {
    // Closed form of x' = x + u with x[0] unknown: the mean of the record less the sums of the input.
    const u = [3, 1, 4, 1, 5, 9, 2, 6];
    const sums = u.map((_, t) => u.slice(0, t).reduce((sum, value) => sum + value, 0));
    const noise = [0.1, -0.2, 0.3, 0, -0.1, 0.2, -0.3, 0.1];
    const x = sums.map((sum, t) => 20 + sum + noise[t]!);
    const rule = recurrence("x[t+1] = x + u", { inputs: ["u"] });
    const moved = fit(rule, record({ x, u }, { inputNames: ["u"] }), { errors: "observation" });
    const mean = x.reduce((total, value, t) => total + value - sums[t]!, 0) / x.length;
    near(of(moved, "x[0]").value, mean, 1e-12);
  });

  test("fits several states at once, each with its own first value", () => {
    const rule = recurrence("A[t+1] = p*A\nB[t+1] = q*B + A");
    const made = { A: [100], B: [5] } as { A: number[]; B: number[] };
    for (let t = 0; t < 12; t++) {
      made.A.push(0.8 * made.A[t]!);
      made.B.push(0.6 * made.B[t]! + made.A[t]!);
    }
    const stream = randomStream(3);
    const read = {
      A: made.A.map((v) => v + 0.1 * stream.normal()),
      B: made.B.map((v) => v + 0.1 * stream.normal()),
    };
    const both = fit(rule, record(read), { errors: "observation" });
    expect(both.groups[0]!.estimates.map(({ name }) => name)).toEqual(["p", "q", "A[0]", "B[0]"]);
    const truth = [0.8, 0.6, 100, 5];
    both.groups[0]!.estimates.forEach(({ value, standardError }, i) => {
      expect(Math.abs(value - truth[i]!)).toBeLessThan(4 * standardError!);
    });
  });

  test("begins a rule with lags from its first values", () => {
    const rule = recurrence("x[t+1] = a*x + b*x[t-1]");
    const x = [4, 5];
    for (let t = 1; t < 14; t++) x.push(1.2 * x[t]! - 0.5 * x[t - 1]!);
    const exact = fit(rule, record({ x: x.map((v, t) => v + (t % 2 ? 1e-3 : -1e-3)) }), {
      errors: "observation",
    });
    expect(exact.groups[0]!.estimates.map(({ name }) => name)).toEqual(["a", "b", "x[1]", "x[0]"]);
    expect(Math.abs(of(exact, "a").value - 1.2)).toBeLessThan(4 * of(exact, "a").standardError!);
  });
});

describe("a one-step fit", () => {
  test("is the regression of the next value on the present one", () => {
    const pairs = values.slice(1).map((next, t) => [values[t]!, next] as const);
    const meanX = pairs.reduce((sum, [x]) => sum + x, 0) / pairs.length;
    const meanY = pairs.reduce((sum, [, y]) => sum + y, 0) / pairs.length;
    const slope =
      pairs.reduce((sum, [x, y]) => sum + (x - meanX) * (y - meanY), 0) /
      pairs.reduce((sum, [x]) => sum + (x - meanX) ** 2, 0);
    const line = fit(affine, record({ x: values }), { errors: "process" });
    near(of(line, "b").value, slope, 1e-10);
    near(of(line, "a").value, meanY - slope * meanX, 1e-9);
  });
});

describe("what the record does not determine", () => {
  test("only a product enters: neither factor gets an error", () => {
    const rule = recurrence("N[t+1] = (p*q)*N");
    const grown = values.slice(0, 9).map((_, t) => 10 * 1.2 ** t * (t % 2 ? 1.02 : 0.99));
    const fitted = fit(rule, record({ N: grown }), { errors: "observation", distribution: "lognormal" });
    expect(of(fitted, "p").standardError).toBeUndefined();
    expect(of(fitted, "q").standardError).toBeUndefined();
    expect(of(fitted, "N[0]").standardError).toBeGreaterThan(0);
    const [warning] = fitted.groups[0]!.warnings.filter(({ code }) => code === "not-determined");
    expect(warning!.message).toBe(
      "p is not determined by this record (only a combination of p and q enters).",
    );
  });

  test("a capacity far beyond an exponential record has no upper limit", () => {
    const grown = Array.from({ length: 12 }, (_, t) => 10 * 1.2 ** t * (t % 2 ? 1.01 : 0.99));
    const fitted = fit(sheltered, record({ N: grown }), { errors: "observation", distribution: "lognormal" });
    expect(of(fitted, "K").standardError).toBeUndefined();
  });
});

test("the same record and options give the same digits", () => {
  const once = fit(sheltered, record({ N: values }), { errors: "observation", distribution: "lognormal" });
  const again = fit(sheltered, record({ N: values }), { errors: "observation", distribution: "lognormal" });
  expect(JSON.stringify(again.groups)).toBe(JSON.stringify(once.groups));
});

describe("a robust fit", () => {
  test("is hardly moved by one wild value, names it, and agrees with least squares without it", () => {
    const wild = values.map((value, t) => (t === 6 ? 150 : value));
    const plain = fit(sheltered, record({ N: wild }), { errors: "observation" });
    const robust = fit(sheltered, record({ N: wild }), { errors: "observation", robust: true });
    const without = fit(sheltered, record({ N: values }), { errors: "observation" });
    const off = (fitted: Fit): number => Math.abs(of(fitted, "K").value - of(without, "K").value);
    expect(off(robust)).toBeLessThan(0.1 * off(plain));
    const warning = robust.groups[0]!.warnings.find(({ code }) => code === "rows-count-less")!;
    expect(warning.message).toMatch(
      /^Outliers, down-weighted to less than half: row 7 \(weight 0\.\d\d\)\. Look/,
    );
  });

  test("gives a mean by Huber's weights", () => {
    // Source: the equation sum psi((x - m)/s) = 0 with psi(u) = max(-1.345, min(1.345, u)), solved here by bisection.
    const x = [3.1, 2.9, 3.3, 3.0, 2.8, 3.2, 9.9];
    const mean = of(
      fit(recurrence("D[t+1] = D"), record({ D: x }), { errors: "observation", robust: true }),
      "D[0]",
    ).value;
    const sizes = x.map((value) => Math.abs(value - mean)).sort((a, b) => a - b);
    // Median absolute residual of 7 values around one fitted level.
    const scale = (sizes[3]! / 0.6744897501960817) * Math.sqrt(7 / 6);
    const pull = x.reduce((sum, value) => sum + Math.max(-1.345, Math.min(1.345, (value - mean) / scale)), 0);
    expect(Math.abs(pull)).toBeLessThan(1e-6);
  });
});

test("a symmetric interval is left out where the profile is lopsided", () => {
  const lopsided = fit(sheltered, record({ N: values.slice(0, 9) }), { errors: "observation" });
  const { profile, wald, value } = of(lopsided, "K");
  const ratio = (profile.upper! - value) / (value - profile.lower!);
  expect(wald === undefined).toBe(ratio > 1.5);
});

test("a fit that sits where the rule bends says so", () => {
  // The level falls to the floor c and stays: the best c is the floor itself, on the bend of max.
  const x = [10, 8, 6.4, 5.12, 5, 5, 5, 5, 5.01, 4.99];
  const bent = fit(recurrence("x[t+1] = max(0.8*x, c)"), record({ x }), { errors: "observation" });
  const { stop, warnings } = bent.groups[0]!;
  const smooth = stop.kind === "converged" && stop.test === "gradient";
  expect(warnings.some(({ code }) => code === "on-a-bend")).toBe(!smooth);
});

test("a censored fit is that of least squares where next to nothing is censored", () => {
  // One value far above everything, known to be above a limit that the curve passes by far: it says nothing.
  const plain = fit(sheltered, record({ N: values }), { errors: "observation" });
  const marks = Int8Array.from([...values.map(() => 0), 1]);
  const censored = fit(sheltered, record({ N: [...values, 1] }, { censoring: { N: marks } }), {
    errors: "observation",
  });
  near(of(censored, "K").value, of(plain, "K").value, 1e-5);
  // n counts the value that says nothing, so the ends agree to about 1/n of their distance.
  const width = ({ profile }: Estimate): number => profile.upper! - profile.lower!;
  near(width(of(censored, "K")), width(of(plain, "K")), 0.1);
});

test("a second solver finds the same parameters", () => {
  const fitted = fit(sheltered, record({ N: values }), { errors: "observation" });
  const { difference, sentence } = secondOpinion(fitted, fitted.groups[0]!)!;
  expect(difference).toBeLessThan(1e-5);
  expect(sentence).toMatch(
    /^A second solver \(ml-levenberg-marquardt\) differs by .* standard errors at most\.$/,
  );
});

test("the second solver's difference does not depend on the unit of the values", () => {
  for (const unit of [1e-9, 1e-6, 1e9]) {
    const scaled = record({ N: values.map((value) => unit * value) });
    const fitted = fit(sheltered, scaled, { errors: "observation" });
    expect(secondOpinion(fitted, fitted.groups[0]!)!.difference).toBeLessThan(1e-5);
  }
});

test("two parameters of which only the product is well known are named with it", () => {
  // theta-logistic near its rest level: only r*theta, the slope there, is told by small departures from it.
  const rule = recurrence("N[t+1] = N*exp(r*(1 - (N/100)^theta))");
  const N = [92];
  for (let t = 0; t < 14; t++) N.push(N[t]! * Math.exp(0.3 * (1 - N[t]! / 100)));
  const read = N.map((value, t) => value + (t % 2 ? 0.02 : -0.02));
  const { warnings } = fit(rule, record({ N: read }), { errors: "observation" }).groups[0]!;
  const { message } = warnings.find(({ code }) => code === "strong-correlation")!;
  expect(message).toMatch(
    /^r and theta are hard to separate \(correlation -[01]\.\d+\): their product is known to /,
  );
});
