// Expected values: SciPy 1.17.1 (optimize.minimize, Nelder-Mead to 1e-13, over stats.poisson and stats.nbinom), printed to
// ten digits; the search here stops at about seven, so tolerances are 1e-6 relative unless said otherwise.
import { describe, expect, test } from "vitest";
import { type Fit, type FitOptions, fit } from "../../src/estimate/index.js";
import { poissonDraw, randomStream } from "../../src/numeric/index.js";
import { recurrence, rules } from "../../src/rule/index.js";
import { record } from "./record.js";

const geometric = recurrence("N[t+1] = R*N");
const poisson: FitOptions = { errors: "observation", distribution: "poisson" };
const clumped: FitOptions = { errors: "observation", distribution: "negative-binomial" };
const value = (fitted: Fit, name: string): number =>
  fitted.groups[0]!.estimates.find((each) => each.name === name)!.value;
const off = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("counts that begin at 0", () => {
  const slow = [0, 0, 3, 2, 5, 2, 8, 4, 8, 2, 7, 9, 4, 10, 4, 11, 12, 6, 5, 7, 4, 2, 12, 10, 8];

  test("the search ends at the optimum, and calls no other end of a search one", () => {
    const fitted = fit(rules.bevertonHolt(), record({ N: slow }), poisson);
    expect(fitted.groups[0]!.stop.kind).toBe("converged");
    expect(off(value(fitted, "R"), 2.03542485)).toBeLessThan(1e-6);
    expect(off(value(fitted, "K"), 7.09256023)).toBeLessThan(1e-6);
    expect(off(value(fitted, "N[0]"), 0.39024586)).toBeLessThan(1e-6);
    expect(fitted.criteria.logLikelihood).toBeCloseTo(-58.013671236, 8);
    expect(fitted.groups[0]!.rivals).toEqual([]);
  });

  test("a negative binomial fit starts where its likelihood exists", () => {
    const N = [0, 1, 1, 2, 4, 3, 6, 8, 9, 14, 15];
    const fitted = fit(geometric, record({ N }), clumped);
    // Its dispersion is 0, so it is the Poisson fit: R 1.36224865, first mean 0.78751844, log-likelihood -18.40221013.
    expect(fitted.groups[0]!.stop.kind).toBe("converged");
    expect(off(value(fitted, "R"), 1.36224865)).toBeLessThan(1e-6);
    expect(fitted.criteria.logLikelihood).toBeCloseTo(-18.40221013, 6);
    const { lower, upper } = fitted.groups[0]!.estimates[0]!.profile;
    expect(lower!).toBeLessThan(1.3);
    expect(upper!).toBeGreaterThan(1.4);
  });

  test("in drawn records no search ends above the best of thirty random starts", () => {
    const rule = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
    const parameters = { bounds: { R: [1, Infinity], K: [0, Infinity] } } as const;
    let stream = randomStream(99);
    for (let k = 0; k < 12; k++) {
      const own = stream;
      stream = stream.jump();
      const N: number[] = [];
      for (let t = 0, mean = 1; t < 25; t++) {
        N.push(poissonDraw(mean, own));
        mean = (1.6 * mean) / (1 + (0.6 * mean) / 6);
      }
      const options = { ...poisson, ...parameters, intervals: "none" } as const;
      const own0 = fit(rule, record({ N }), options).criteria.logLikelihood;
      for (let j = 0; j < 30; j++) {
        const start = {
          R: 1.05 + 3 * own.uniform(),
          K: 2 + 12 * own.uniform(),
          "N[0]": 0.05 + own.uniform(),
        };
        const other = fit(rule, record({ N }), { ...options, start }).criteria.logLikelihood;
        expect(other - own0).toBeLessThan(1e-3);
      }
    }
  });
});

test("a step from a count of 0 is refused with the remedy", () => {
  // Every step from a count of 0 gives 0, which no later count fits.
  const N = [4, 0, 5, 4, 8, 9];
  expect(() => fit(geometric, record({ N }), { ...poisson, errors: "process" })).toThrow(
    expect.objectContaining({
      code: "step-from-zero",
      message: expect.stringMatching(/^Row 2 is a count of 0/),
    }),
  );
  expect(fit(geometric, record({ N }), poisson).groups[0]!.stop.kind).toBe("converged");
});

describe("weights of counts", () => {
  const N = [5, 9, 12, 19, 30, 41, 60, 88, 120, 170];
  const weights = Float64Array.from(N, (_, t) => (t === 9 ? 100 : 1));

  test.each([
    ["poisson", 1.44318137, 1.4345344],
    ["negative-binomial", 1.44318137, 1.4345344],
  ] as const)("%s: a weight multiplies a row's log-likelihood", (distribution, plain, weighted) => {
    const options = { ...poisson, distribution };
    expect(off(value(fit(geometric, record({ N }), options), "R"), plain)).toBeLessThan(1e-6);
    expect(off(value(fit(geometric, record({ N }, { weights }), options), "R"), weighted)).toBeLessThan(1e-6);
  });

  test("a weight of 2 is the row twice", () => {
    // A level of counts: its estimate is their weighted mean, its standard error sqrt(level / sum of weights).
    const D = [3, 5, 4, 6, 2, 7];
    const twos = Float64Array.of(2, 1, 1, 2, 1, 1);
    const level = fit(recurrence("D[t+1] = D"), record({ D }, { weights: twos }), poisson).groups[0]!;
    const mean = (2 * 3 + 5 + 4 + 2 * 6 + 2 + 7) / 8;
    expect(off(level.estimates[0]!.value, mean)).toBeLessThan(1e-6);
    expect(off(level.estimates[0]!.standardError!, Math.sqrt(mean / 8))).toBeLessThan(1e-4);
  });
});

describe("counts known only to a limit", () => {
  const right = Int8Array.of(0, 0, 0, 0, 0, 0, 0, 0, 1, 0, 1, 1);
  const both = Int8Array.of(0, 0, -1, 0, 0, 0, 0, 1, 0, 1, 0, 1);
  const growth = [4, 6, 5, 9, 12, 10, 20, 18, 30, 25, 30, 30];
  const wide = [3, 9, 2, 14, 8, 27, 10, 40, 22, 40, 19, 40];

  test("at or above it: the probability of that count and all larger ones", () => {
    const fitted = fit(geometric, record({ N: growth }, { censoring: { N: right } }), poisson);
    expect(off(value(fitted, "R"), 1.2461729189)).toBeLessThan(1e-6);
    expect(off(value(fitted, "N[0]"), 4.3608969893)).toBeLessThan(1e-6);
    expect(fitted.criteria.logLikelihood).toBeCloseTo(-22.5379231483, 8);
  });

  test.each([
    ["poisson", 1.2010107685, 6.1619448836, -47.6010980756],
    ["negative-binomial", 1.3081922921, 4.3597957459, -31.5576924037],
  ] as const)("%s, limits on both sides", (distribution, R, first, logLikelihood) => {
    const observations = record({ N: wide }, { censoring: { N: both } });
    const fitted = fit(geometric, observations, { ...poisson, distribution });
    expect(off(value(fitted, "R"), R)).toBeLessThan(1e-6);
    expect(off(value(fitted, "N[0]"), first)).toBeLessThan(1e-6);
    expect(fitted.criteria.logLikelihood).toBeCloseTo(logLikelihood, 8);
  });

  test("the dispersion of counts with limits on both sides", () => {
    const fitted = fit(geometric, record({ N: wide }, { censoring: { N: both } }), clumped);
    expect(off(value(fitted, "dispersion"), 0.3615899392)).toBeLessThan(1e-5);
  });
});

describe("overdispersion of a Poisson fit", () => {
  test("is Pearson's chi-square over its degrees of freedom", () => {
    const N = [291, 262, 171, 170, 105, 116, 71, 70, 38, 49, 26, 31, 15, 22, 13, 9, 5, 11, 3, 4];
    const { overdispersion, estimates } = fit(geometric, record({ N }), poisson).groups[0]!;
    expect(overdispersion!.statistic).toBeCloseTo(29.7460086, 5);
    expect(overdispersion!.degreesOfFreedom).toBe(18);
    // scipy.stats.chi2.sf(29.746, 18) is 0.03999; small means widen the statistic, so the probability is a little larger.
    expect(overdispersion!.probability).toBeGreaterThan(0.03999);
    expect(overdispersion!.probability).toBeLessThan(0.044);
    expect(off(estimates[0]!.standardError!, 0.005326938779)).toBeLessThan(1e-4);
  });

  test("is named with its size and the remedy where it is clear", () => {
    const N = [310, 205, 240, 130, 160, 70, 118, 50, 66, 60, 19, 41, 14, 30, 9, 17, 4, 12];
    const { warnings } = fit(geometric, record({ N }), poisson).groups[0]!;
    const { message } = warnings.find(({ code }) => code === "overdispersed")!;
    expect(message).toContain('`distribution: "negative-binomial"`');
    const remedied = fit(geometric, record({ N }), clumped).groups[0]!;
    expect(remedied.warnings.map(({ code }) => code)).not.toContain("overdispersed");
  });

  test("is not called in more Poisson records than one in a hundred, small means included", () => {
    let stream = randomStream(5);
    let called = 0;
    for (let k = 0; k < 300; k++) {
      const own = stream;
      stream = stream.jump();
      const N = Array.from({ length: 20 }, (_, t) => poissonDraw(4 * 0.9 ** t, own));
      const options = { ...poisson, intervals: "none" } as const;
      const { overdispersion } = fit(geometric, record({ N }), options).groups[0]!;
      if (overdispersion!.probability < 0.01) called++;
    }
    // 3 expected, with a binomial standard deviation of 1.7.
    expect(called).toBeLessThanOrEqual(8);
  });
});
