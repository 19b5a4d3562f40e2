import { describe, expect, test } from "vitest";
import { type Estimate, type Fit, type FitOptions, fit } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "./record.js";

const of = (fitted: Fit, name: string): Estimate =>
  fitted.groups[0]!.estimates.find((estimate) => estimate.name === name)!;

/** A path with errors in its steps, read with errors, both on the log scale. */
function wandering(step: (level: number) => number, first: number, count: number, seed: number): number[] {
  const stream = randomStream(seed);
  const read: number[] = [];
  for (let t = 0, level = first; t < count; t++) {
    read.push(level * Math.exp(0.1 * stream.normal()));
    level = step(level) * Math.exp(0.1 * stream.normal());
  }
  return read;
}

describe("errors in both the process and the observation", () => {
  test("the exact likelihood of a few values is that of their joint normal distribution", () => {
    // x' = c + b x + e, read with error d: mean c/(1-b), covariance q b^|i-j|/(1-b^2) + r on the diagonal.
    const rule = recurrence("x[t+1] = c + b*x");
    const x = [2.1, 1.4, 3.2, 2.8, 1.1, 2.6, 2.2, 3.9];
    const fitted = fit(rule, record({ x }), { errors: "both" });
    const [c, b] = ["c", "b"].map((name) => of(fitted, name).value) as [number, number];
    const [q, r] = ["process error", "observation error"].map((name) => of(fitted, name).value ** 2) as [
      number,
      number,
    ];
    const covariance = x.map((_, i) =>
      x.map((_, j) => (q * b ** Math.abs(i - j)) / (1 - b * b) + (i === j ? r : 0)),
    );
    expect(fitted.groups[0]!.filter!.start).toBe("stationary");
    expect(
      Math.abs(
        fitted.groups[0]!.criteria!.logLikelihood -
          jointNormal(
            x.map((v) => v - c / (1 - b)),
            covariance,
          ),
      ),
    ).toBeLessThan(1e-8);
  });

  test("a rule that is not linear on the scale is filtered by its slope, and finds what made the record", () => {
    const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
    const N = wandering((level) => (1.5 * level) / (1 + (0.5 * level) / 100), 5, 80, 4);
    const fitted = fit(rule, record({ N }), { errors: "both", distribution: "lognormal" });
    expect(fitted.groups[0]!.filter).toMatchObject({ start: "diffuse", method: "extended" });
    const { lower, upper } = of(fitted, "K").profile;
    expect(lower!).toBeLessThan(100);
    expect(upper!).toBeGreaterThan(100);
    expect(of(fitted, "R").profile.lower!).toBeLessThan(1.5);
    expect(of(fitted, "R").profile.upper!).toBeGreaterThan(1.5);
  });

  test("particles agree with the exact filter where the rule is linear, within their own scatter", () => {
    // The same linear rule, written so that it reads the period and is filtered by its slope: that filter is exact too.
    const rule = recurrence("x[t+1] = c + b*x + 0*t");
    const stream = randomStream(10);
    const x = [3];
    for (let t = 1; t < 30; t++) x.push(1 + 0.6 * x[t - 1]! + 0.5 * stream.normal());
    const read = x.map((value) => value + 0.4 * stream.normal());
    const { filter, warnings } = fit(rule, record({ x: read }), { errors: "both" }).groups[0]!;
    const { check } = filter!;
    expect(check).toMatchObject({ lost: 0, of: 4 });
    expect(Math.abs(check!.particles! - check!.filter)).toBeLessThan(4 * check!.deviation! + 0.1);
    expect(warnings.map(({ code }) => code)).not.toContain("filter-rough");
  });

  test("a known error of reading narrows the rest", () => {
    const stream = randomStream(6);
    const x = Array.from({ length: 40 }, () => 0);
    for (let t = 1; t < 40; t++) x[t] = 0.7 * x[t - 1]! + stream.normal();
    const read = x.map((value) => value + 0.5 * stream.normal());
    const rule = recurrence("x[t+1] = b*x");
    const open = fit(rule, record({ x: read }), { errors: "both" });
    const known = fit(rule, record({ x: read }), { errors: "both", sd: 0.5 });
    expect(known.groups[0]!.estimates.map(({ name }) => name)).toEqual(["b", "process error"]);
    const width = ({ profile }: Estimate): number =>
      (profile.upper ?? Infinity) - (profile.lower ?? -Infinity);
    expect(width(of(known, "b"))).toBeLessThan(width(of(open, "b")));
  });
});

describe("records that begin far from the long run", () => {
  const decaying = [100, 61, 36, 24, 12, 9, 4, 4, 1, 2];
  const levelling = [100, 68, 50, 42, 33, 30, 27, 27, 24, 26, 25, 24];
  const growing = [1.1, 2.3, 4, 7.8, 11.5, 19.8, 25.2, 38, 44, 58, 62, 75, 70, 84, 88];
  const gompertz = "N[t+1] = N*exp(a)*N^(b - 1)";
  const onLog: Partial<FitOptions> = { distribution: "lognormal" };

  // Source: computed with SciPy's minimize on an exact Kalman filter. Diffuse start: the state begins at the first reading
  // with the reading's variance; known start: at the value given with variance 0. Readings count from the second on.
  test.each<{
    text: string;
    N: readonly number[];
    more: Partial<FitOptions>;
    start: "diffuse" | "known";
    expected: Readonly<Record<string, number>>;
    logLikelihood: number;
  }>([
    {
      text: "N[t+1] = R*N",
      N: decaying,
      more: {},
      start: "diffuse",
      expected: { R: 0.6067585, "process error": 0, "observation error": 1.0516066 },
      logLikelihood: -13.4528519,
    },
    {
      text: "N[t+1] = R*N",
      N: decaying,
      more: { initial: { N: 95 } },
      start: "known",
      expected: { R: 0.6211031, "process error": 0, "observation error": 1.2797087 },
      logLikelihood: -14.9901388,
    },
    {
      text: "N[t+1] = a*N + b",
      N: levelling,
      more: {},
      start: "diffuse",
      expected: { a: 0.5914453, b: 9.9446087, "process error": 0, "observation error": 0.9753831 },
      logLikelihood: -15.5493904,
    },
    {
      text: "N[t+1] = a*N + b",
      N: levelling,
      more: { initial: { N: 95 } },
      start: "known",
      expected: { a: 0.6143923, b: 9.2242234, "process error": 0, "observation error": 0.9103119 },
      logLikelihood: -14.5746762,
    },
    {
      text: gompertz,
      N: growing,
      more: onLog,
      start: "diffuse",
      expected: { a: 0.8106436, b: 0.8354815, "process error": 0, "observation error": 0.0735133 },
      logLikelihood: 16.0824674,
    },
    {
      text: gompertz,
      N: growing,
      more: { ...onLog, initial: { N: 1.3 } },
      start: "known",
      expected: { a: 0.73137, b: 0.856485, "process error": 0.061539, "observation error": 0.060586 },
      logLikelihood: 13.1747789,
    },
  ])("$text, $start start", ({ text, N, more, start, expected, logLikelihood }) => {
    const fitted = fit(recurrence(text), record({ N }), { errors: "both", intervals: "none", ...more });
    expect(fitted.groups[0]!.filter).toMatchObject({ start, method: "exact" });
    for (const [name, value] of Object.entries(expected))
      expect(Math.abs(of(fitted, name).value - value)).toBeLessThan(3e-6);
    expect(Math.abs(fitted.criteria.logLikelihood - logLikelihood)).toBeLessThan(1e-6);
  });

  test("a known start is what the fit begins from, and is said", () => {
    const fitted = fit(recurrence("N[t+1] = R*N"), record({ N: decaying }), {
      errors: "both",
      initial: { N: 95 },
      intervals: "none",
    });
    expect(fitted.groups[0]!.initial).toEqual({ N: 95 });
    expect(fitted.conventions.join(" ")).toContain("the first state is known (`initial`)");
  });

  test("part of a first state is refused; the whole of it is taken", () => {
    const rule = recurrence("N[t+1] = R*N + b*N[t-1]");
    const both: FitOptions = { errors: "both", intervals: "none" };
    expect(() =>
      fit(rule, record({ N: decaying }), { ...both, initial: { N: 61 } }),
    ).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: Option \`initial\` gives part of the first state; N[0] is missing. With \`errors: "both"\` give a value, or a list of them, oldest first, where the rule reads past values, for every one of N, or leave \`initial\` out.]`,
    );
    const whole = fit(rule, record({ N: decaying }), { ...both, initial: { N: [100, 61] } });
    expect(whole.groups[0]!.filter!.start).toBe("known");
  });
});

test("advice on two errors that are hardly told apart asks for nothing that was given", () => {
  const N = [100, 68, 50, 42, 33, 30, 27, 27, 24, 26, 25, 24];
  const advice = (options: Partial<FitOptions>): string =>
    fit(recurrence("N[t+1] = a*N + b"), record({ N }), {
      errors: "both",
      ...options,
    }).groups[0]!.warnings.find(({ code }) => code === "errors-not-separated")!.message;
  // The readings after the first have a mean of 34.2, of which 5% is 1.7.
  expect(advice({})).toContain("`sd: 2`, in the record's unit");
  expect(advice({ distribution: "lognormal" })).toContain("`sd: 0.15` on the log scale");
  expect(advice({ sd: 1 })).toContain("Beside the `sd` given");
  expect(advice({ sd: 1 })).not.toContain("give it");
});

/** Log density of a normal vector, by elimination. */
function jointNormal(values: readonly number[], covariance: readonly (readonly number[])[]): number {
  const rows = covariance.map((row, i) => [...row, values[i]!]);
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
