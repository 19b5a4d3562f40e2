import { describe, expect, test } from "vitest";
import { bootstrap, type FitOptions, fit } from "../../src/estimate/index.js";
import { leastSquares, randomStream } from "../../src/numeric/index.js";
import { type Rule, recurrence, rules } from "../../src/rule/index.js";
import { type Columns, record } from "./record.js";

const steps: FitOptions = { errors: "process", distribution: "lognormal" };
const plain: FitOptions = { errors: "process" };

/** Periods 0 to 6 and 18 to 24: six steps, one of twelve, six more. */
const blocks = [0, 1, 2, 3, 4, 5, 6, 18, 19, 20, 21, 22, 23, 24];

describe("closed forms of a step whose error is carried on as it is", () => {
  const values = blocks.map((t) => 100 * Math.exp(0.05 * t + 0.1 * Math.sin(7 * t)));

  test("geometric growth: the mean rate over all steps, known to sigma / sqrt(steps)", () => {
    const [group] = fit(rules.geometric(), record({ t: blocks, N: values }), steps).groups;
    const [R] = group!.estimates;
    // ln R is the whole change over the 24 steps, whatever lies between; its variance is sigma^2 / 24.
    const rate = Math.log(values[13]! / values[0]!) / 24;
    expect(Math.abs(Math.log(R!.value) - rate)).toBeLessThan(1e-12);
    expect(Math.abs(R!.standardError! / R!.value - group!.sigma / Math.sqrt(24))).toBeLessThan(1e-10);
    const squares = values
      .slice(1)
      .map((value, i) => [Math.log(value / values[i]!), blocks[i + 1]! - blocks[i]!] as const)
      .reduce((sum, [change, span]) => sum + (change - span * rate) ** 2 / span, 0);
    expect(Math.abs(group!.sigma - Math.sqrt(squares / 12))).toBeLessThan(1e-12);
    expect(group!.points.map(({ weight }) => 1 / weight)[6]).toBeCloseTo(12, 10);
  });

  test("a random walk with drift: the same on the natural scale", () => {
    const [group] = fit(recurrence("x[t+1] = x + c"), record({ t: blocks, x: values }), plain).groups;
    const [c] = group!.estimates;
    expect(Math.abs(c!.value - (values[13]! - values[0]!) / 24)).toBeLessThan(1e-10);
    expect(Math.abs(c!.standardError! - group!.sigma / Math.sqrt(24))).toBeLessThan(1e-9);
  });

  test("records drawn from the fit scatter as the fit says", () => {
    const found = fit(rules.geometric(), record({ t: blocks, N: values }), steps);
    const [row] = bootstrap(found, { resamples: 2000 }).rows;
    // 2,000 draws give a standard deviation to 1.6%: four of those.
    expect(Math.abs(row!.standardError / found.groups[0]!.estimates[0]!.standardError! - 1)).toBeLessThan(
      0.064,
    );
  });
});

test("a slope below 1 forgets: k steps of x' = a + b x have the variance (1 - b^2k) / (1 - b^2)", () => {
  const t = [0, 1, 2, 4, 5, 6, 9, 10, 11, 12];
  const x = [50, 42, 36.5, 29, 27.2, 25.6, 22.8, 22.3, 21.6, 21.4];
  const [group] = fit(recurrence("x[t+1] = a + b*x"), record({ t, x }), plain).groups;
  const [a, b] = group!.estimates.map(({ value }) => value);
  const spans = t.slice(1).map((at, i) => at - t[i]!);
  const direct = leastSquares({
    residuals: ([A, B]) =>
      spans.map((span, i) => {
        const power = B! ** span;
        const error = x[i + 1]! - (power * x[i]! + (A! * (1 - power)) / (1 - B!));
        return error / Math.sqrt((1 - b! ** (2 * span)) / (1 - b! ** 2));
      }),
    start: [4, 0.8],
  });
  expect(Math.abs(direct.estimates[0]! / a! - 1)).toBeLessThan(1e-7);
  expect(Math.abs(direct.estimates[1]! / b! - 1)).toBeLessThan(1e-8);
  expect(Math.abs(direct.standardErrors[1]! / group!.estimates[1]!.standardError! - 1)).toBeLessThan(1e-6);
});

// Source: SciPy 1.17.1: generalised least squares with the dense covariance of all values reached from one row, from
// differences of the stochastic recursion by the noise of every step, iterated with least_squares until it no longer moves.
// Printed to 7 digits; tolerance 2e-6, about what the differences keep.
const t = [0, 1, 2, 3, 4, 5, 11, 12, 13, 14, 15, 19, 20, 21, 22];
const N = [20, 27.1, 36.4, 52.2, 60.1, 74.8, 96.2, 108.4, 93.7, 101.9, 88.3, 104.1, 97.5, 110.2, 92.6];
const [x, w] = [
  [10, 12.3, 13.1, 14.9, 18.2, 17.5, 18.8, 19.4, 18.9, 20.3, 19.7, 21.2],
  [5, 5.9, 7.4, 7.9, 11.8, 12.6, Number.NaN, 13.1, 13.9, 14.6, 15.2, 14.8],
];
const pair = { t: [0, 1, 2, 3, 7, 8, 9, 10, 11, 14, 15, 16], x, w };
const cases: readonly (readonly [
  string,
  Rule,
  Columns,
  FitOptions,
  Record<string, readonly [number, number]>,
  number,
])[] = [
  [
    "Ricker's rule",
    rules.ricker(),
    { t, N },
    steps,
    { r: [0.45649447, 0.06357612], K: [97.33282317, 4.99654052] },
    0.087399029944,
  ],
  [
    "an affine rule",
    recurrence("N[t+1] = a + b*N"),
    { t, N },
    plain,
    { a: [19.77879312, 7.10600611], b: [0.79823824, 0.08371113] },
    9.7758237654,
  ],
  [
    "a rule with a lag, where two values are reached from one row",
    recurrence("N[t+1] = N*exp(r*(1 - N[t-1]/K))"),
    { t, N },
    steps,
    { r: [0.37203191, 0.08925791], K: [96.06954679, 8.44220477] },
    0.11755704328,
  ],
  [
    "two states that share their errors over a gap, one not read once",
    recurrence("x[t+1] = a*x + b*w\nw[t+1] = c*x + d*w"),
    pair as Columns,
    plain,
    {
      a: [1.20348114, 0.10263324],
      b: [-0.25260564, 0.15209925],
      c: [0.28692782, 0.11164455],
      d: [0.61877696, 0.16463354],
    },
    0.80394446445,
  ],
];

test.each(cases)("generalised least squares over gaps: %s", (_, rule, columns, options, expected, sigma) => {
  const [group] = fit(rule, record(columns), options).groups;
  for (const { name, value, standardError } of group!.estimates) {
    const [estimate, error] = expected[name]!;
    expect(Math.abs(value / estimate - 1), name).toBeLessThan(2e-6);
    expect(Math.abs(standardError! / error - 1), name).toBeLessThan(2e-6);
  }
  expect(Math.abs(group!.sigma / sigma - 1)).toBeLessThan(1e-6);
});

test("the likelihood counts the variances over gaps, so that rules can be compared", () => {
  // Source: as above: -n/2 (ln(2 pi RSS/n) + 1) - ln det of the covariances / 2, with n 14, RSS 0.09166308522 and 0.3610238623.
  const { criteria } = fit(rules.ricker(), record({ t, N }), steps);
  const expected = -7 * (Math.log((2 * Math.PI * 0.09166308522) / 14) + 1) - 0.3610238623;
  expect(Math.abs(criteria.logLikelihood - expected)).toBeLessThan(1e-6);
});

// 400 records: a correct 95% interval holds the truth in 365 to 393 of them with probability 99.9% (binomial); with every gap
// weighed as one step it would in about 250 and 210.
test.each([6, 11])("95% intervals of a rate over one block of %i missing periods", (missing) => {
  let stream = randomStream(missing);
  let covered = 0;
  for (let k = 0; k < 400; k++) {
    stream = stream.jump();
    const all = [100];
    for (let at = 0; at < 24; at++) all.push(all[at]! * Math.exp(0.05 + 0.1 * stream.normal()));
    const kept = all.map((_, at) => at).filter((at) => at < 7 || at >= 7 + missing);
    const drawn = record({ t: kept, N: kept.map((at) => all[at]!) });
    const [R] = fit(rules.geometric(), drawn, steps).groups[0]!.estimates;
    if (R!.profile.lower! <= Math.exp(0.05) && Math.exp(0.05) <= R!.profile.upper!) covered++;
  }
  expect(covered).toBeGreaterThanOrEqual(365);
  expect(covered).toBeLessThanOrEqual(393);
});
