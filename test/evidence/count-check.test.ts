import { describe, expect, test } from "vitest";
import { type FitOptions, fit, problemOf } from "../../src/estimate/index.js";
import { residualTests } from "../../src/evidence/check/residual-tests.js";
import { check } from "../../src/evidence/index.js";
import { gammaDraw, normalCdf, poissonDraw, randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "../estimate/record.js";

const decline = recurrence("N[t+1] = d*N");
const poisson: FitOptions = { errors: "observation", distribution: "poisson", intervals: "none" };
const clumped: FitOptions = { ...poisson, distribution: "negative-binomial" };

/** How many of 60 drawn records each kind of test speaks of at 5%. */
function alarms(draw: (t: number) => number, options: FitOptions): Record<string, number> {
  const found: Record<string, number> = {};
  let stream = randomStream(31);
  for (let k = 0; k < 60; k++) {
    stream = stream.jump();
    const fitted = fit(decline, record({ N: Array.from({ length: 30 }, (_, t) => draw(t)) }), options);
    for (const { name, probability } of residualTests(fitted, fitted.groups[0]!, stream))
      if (probability !== undefined) found[name] = (found[name] ?? 0) + (probability < 0.05 ? 1 : 0);
  }
  return found;
}

describe("residual tests of counts", () => {
  const means = (t: number): number => 300 * Math.exp(-0.12 * t);

  test("call Poisson counts what they are: each test speaks in about 5% of records", () => {
    const stream = randomStream(7);
    const found = alarms((t) => poissonDraw(means(t), stream), poisson);
    // 3 of 60 expected, with a binomial standard deviation of 1.7.
    for (const [name, count] of Object.entries(found)) expect([name, count <= 8]).toEqual([name, true]);
  });

  test("call negative binomial counts what they are", () => {
    const stream = randomStream(8);
    const found = alarms((t) => poissonDraw((means(t) / 3) * gammaDraw(3, stream), stream), clumped);
    for (const [name, count] of Object.entries(found)) expect([name, count <= 8]).toEqual([name, true]);
  });

  test("see negative binomial counts that were fitted as Poisson", () => {
    const stream = randomStream(8);
    const found = alarms((t) => poissonDraw((means(t) / 3) * gammaDraw(3, stream), stream), poisson);
    expect(found["Variance of quantile residuals"]).toBe(60);
  });
});

describe("randomised quantile residuals", () => {
  test("lie within the step of the count's distribution function", () => {
    const N = [3, 5, 4, 6, 2, 7, 4, 1, 5, 3];
    const fitted = fit(recurrence("N[t+1] = N"), record({ N }), poisson);
    const { residuals } = problemOf(fitted).group("");
    // Source: scipy.stats.poisson.cdf(k, 4), printed to ten digits, k = 0 to 7.
    const cdf = [
      0, 0.0183156389, 0.0915781944, 0.2381033056, 0.4334701203, 0.6288369352, 0.785130387, 0.8893260216,
      0.9488663842,
    ];
    for (const seed of [1, 2, 3])
      residuals("quantile", randomStream(seed)).forEach((residual, i) => {
        const share = normalCdf(residual);
        expect(share).toBeGreaterThanOrEqual(cdf[N[i]!]! - 1e-7);
        expect(share).toBeLessThanOrEqual(cdf[N[i]! + 1]! + 1e-7);
      });
  });

  test("Pearson's are in standard deviations, and unknown of a value known to a limit", () => {
    const N = [3, 5, 4, 6, 2, 7, 4, 1, 5, 9];
    const censoring = { N: Int8Array.from(N, (count) => (count === 9 ? 1 : 0)) };
    const fitted = fit(recurrence("N[t+1] = N"), record({ N }, { censoring }), poisson);
    const level = fitted.groups[0]!.estimates[0]!.value;
    const pearson = problemOf(fitted).group("").residuals("pearson", randomStream(1));
    expect(pearson[0]).toBeCloseTo((3 - level) / Math.sqrt(level), 9);
    expect(pearson[9]).toBeNaN();
    // A value at or above 9 has a quantile residual above that of the counts below it.
    const quantile = problemOf(fitted).group("").residuals("quantile", randomStream(1));
    expect(normalCdf(quantile[9]!)).toBeGreaterThan(0.9);
  });
});

test("a check of counts names the scatter and the remedy, and asks nothing of levels that do not differ", () => {
  const stream = randomStream(3);
  const N = Array.from({ length: 40 }, () => poissonDraw(20 * 0.5 * gammaDraw(2, stream), stream));
  const fitted = fit(recurrence("N[t+1] = m"), record({ N }), {
    errors: "process",
    distribution: "poisson",
  });
  const [group] = check(fitted, { resamples: 50 }).groups;
  expect(group!.concerns.join(" ")).toContain('`distribution: "negative-binomial"`');
  expect(group!.tests.map(({ kind }) => kind)).not.toContain("spread");
  expect(group!.recovery!.parameters.map(({ name }) => name)).toEqual(["m"]);
});
