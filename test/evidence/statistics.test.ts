// Where no other source is named, values are computed by R 4.2.2 on the named series and printed to the digits
// shown: tolerance 1e-8 relative, or half a unit of the last digit where fewer are printed.
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { autocorrelations, partialAutocorrelations } from "../../src/evidence/statistics/autocorrelation.js";
import { durbinWatson } from "../../src/evidence/statistics/durbin-watson.js";
import { boxPierce, ljungBox } from "../../src/evidence/statistics/portmanteau.js";
import { runsAtMost, runsTest } from "../../src/evidence/statistics/runs-test.js";
import {
  crpsLognormal,
  crpsNormal,
  intervalScore,
  scaledError,
} from "../../src/evidence/statistics/scores.js";
import { shapiroWilk } from "../../src/evidence/statistics/shapiro-wilk.js";
import { spreadTest } from "../../src/evidence/statistics/spread-test.js";
import { randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { yeast } from "../published/carlson-yeast.js";
import { hormone, lakeLevel, passengers, stopping } from "./published-series.js";
import { series } from "./series.js";

const off = (value: number, expected: number): number => Math.abs(value / expected - 1);

/** Residuals of a straight line by least squares. */
function lineResiduals(x: readonly number[], y: readonly number[]): number[] {
  const mean = (values: readonly number[]): number => values.reduce((sum, v) => sum + v, 0) / values.length;
  const [mx, my] = [mean(x), mean(y)];
  const xy = x.reduce((sum, value, i) => sum + (value - mx) * (y[i]! - my), 0);
  const slope = xy / x.reduce((sum, value) => sum + (value - mx) ** 2, 0);
  return y.map((value, i) => value - my - slope * (x[i]! - mx));
}

/** One-step residuals of the quadratic rule on Carlson's yeast (the change on the level and its square). */
function yeastResiduals(): number[] {
  const record = series(yeast);
  const fitted = fit(recurrence("ΔN = r*N + s*N^2"), record, { errors: "process" });
  return fitted.groups[0]!.points.map((point) => point.residual);
}

describe("correlation between periods", () => {
  test("autocorrelations and partial autocorrelations of lh (R acf and pacf)", () => {
    const lags = autocorrelations(hormone, 4);
    [0.5755244755, 0.1818181818, -0.1447552448, -0.1748251748].forEach((expected, k) => {
      expect(off(lags[k]!, expected)).toBeLessThan(1e-8);
    });
    const partial = partialAutocorrelations(lags);
    [0.5755244755, -0.2234099729, -0.2269402017, 0.102768377].forEach((expected, k) => {
      expect(off(partial[k]!, expected)).toBeLessThan(1e-8);
    });
  });

  test("Ljung-Box and Box-Pierce of lh to lag 5 (R Box.test)", () => {
    const improved = ljungBox(hormone, 5);
    expect(off(improved.statistic, 22.673185)).toBeLessThan(2.5e-8);
    expect(off(improved.probability, 0.0003897448)).toBeLessThan(1.3e-7);
    const plain = boxPierce(hormone, 5);
    expect(off(plain.statistic, 21.0335723)).toBeLessThan(1e-8);
    expect(off(plain.probability, 0.0007983137)).toBeLessThan(1e-7);
  });

  test("Durbin-Watson of regressions on cars, LakeHuron and the yeast record (R)", () => {
    expect(off(durbinWatson(lineResiduals(stopping.speed, stopping.distance)), 1.676225323)).toBeLessThan(
      1e-8,
    );
    const years = lakeLevel.map((_, i) => i);
    expect(off(durbinWatson(lineResiduals(years, lakeLevel)), 0.4394932293)).toBeLessThan(1e-8);
    expect(off(durbinWatson(yeastResiduals()), 1.095146741)).toBeLessThan(1e-8);
  });

  test("a gap takes its pairs out of lag 1 and of Durbin-Watson", () => {
    const gap = [1, -1, Number.NaN, 1, -1];
    expect(autocorrelations(gap, 1)[0]).toBe(-0.5);
    expect(durbinWatson(gap)).toBe(2);
  });
});

describe("shape of residuals", () => {
  test("Shapiro-Wilk of the yeast residuals (R shapiro.test)", () => {
    const found = shapiroWilk(yeastResiduals())!;
    expect(off(found.statistic, 0.9294668909)).toBeLessThan(1e-8);
    expect(off(found.probability, 0.1900406)).toBeLessThan(2.6e-7);
  });

  // Source: Shapiro and Wilk (1965), Biometrika 52, section 4.1: weights of eleven men, printed W = 0.79
  // (sample and W from memory). Further digits and the other sizes: computed with SciPy 1.17 (stats.shapiro).
  test("Shapiro-Wilk of the published weights, and at the sizes where its formulas change", () => {
    const men = shapiroWilk([148, 154, 158, 160, 161, 162, 166, 170, 182, 195, 236])!;
    expect(men.statistic).toBeCloseTo(0.79, 2);
    expect(off(men.statistic, 0.7888146948631716)).toBeLessThan(1e-8);
    expect(off(men.probability, 0.006703814061898823)).toBeLessThan(1e-7);
    const rising = (n: number): number[] =>
      Array.from({ length: n }, (_, i) => Math.exp((1.7 * (i + 1)) / n));
    const expected: readonly (readonly [number, number, number])[] = [
      [3, 0.9752390027145051, 0.6982173954216295],
      [5, 0.9544639283187974, 0.7690048783739893],
      [8, 0.941778374322853, 0.6286588552510541],
      [11, 0.9355042672604923, 0.4691706390978635],
      [12, 0.9340775920413783, 0.4253413502336886],
      [50, 0.9231684897715671, 0.0030752663190645],
    ];
    for (const [n, statistic, probability] of expected) {
      expect(off(shapiroWilk(rising(n))!.statistic, statistic)).toBeLessThan(1e-8);
      expect(off(shapiroWilk(rising(n))!.probability, probability)).toBeLessThan(1e-7);
    }
  });

  test("a sample of two, or of equal values, has no Shapiro-Wilk", () => {
    expect(shapiroWilk([1, 2])).toBeUndefined();
    expect(shapiroWilk([3, 3, 3, 3])).toBeUndefined();
  });

  // Source: Swed and Eisenhart (1943), table II, lower and upper 2.5% limits of the number of runs; from memory.
  test("runs are unusual at the tabulated numbers", () => {
    for (const [each, few, many] of [
      [5, 2, 10],
      [10, 6, 16],
      [20, 14, 28],
    ] as const) {
      expect(runsAtMost(few, each, each)).toBeLessThanOrEqual(0.025);
      expect(runsAtMost(few + 1, each, each)).toBeGreaterThan(0.025);
      expect(1 - runsAtMost(many - 1, each, each)).toBeLessThanOrEqual(0.025);
      expect(1 - runsAtMost(many - 2, each, each)).toBeGreaterThan(0.025);
    }
  });

  // Counted by hand: of the 6 orders of two pluses and two minuses, 2 have 2 runs, 2 have 3 and 2 have 4.
  test("runs of four signs by counting", () => {
    expect(runsAtMost(2, 2, 2)).toBeCloseTo(1 / 3, 12);
    expect(runsAtMost(3, 2, 2)).toBeCloseTo(2 / 3, 12);
    expect(runsTest([1, 2, -1, 0, -3])).toMatchObject({ runs: 2, above: 2, below: 2, expected: 3 });
  });

  // Source: n r^2 of squared residuals and fitted values; r by SciPy 1.17 (stats.pearsonr), p by stats.chi2.sf.
  test("the spread test is n R^2 of squared residuals on the fitted values", () => {
    const found = spreadTest(lineResiduals(stopping.speed, stopping.distance), stopping.speed);
    expect(off(found.statistic, 3.2148799271746484)).toBeLessThan(1e-8);
    expect(off(found.probability, 0.07297154505407795)).toBeLessThan(1e-7);
  });
});

describe("scores of forecasts", () => {
  test("CRPS of normal forecasts (closed form)", () => {
    const cases: readonly (readonly [number, number, number, number])[] = [
      [0, 0, 1, 0.2336949773],
      [1, 0, 1, 0.6024413576],
      [0.3, 0, 2, 0.485308772],
      [-1, 1, 0.5, 1.717912353],
    ];
    for (const [value, mean, deviation, expected] of cases)
      expect(off(crpsNormal(value, mean, deviation), expected)).toBeLessThan(1e-8);
  });

  // Source: the definition, E|X - y| - E|X - X'|/2, by simulation; tolerance four standard errors.
  test("the lognormal CRPS agrees with its definition", () => {
    const stream = randomStream(5);
    const size = 200_000;
    const terms = Array.from({ length: size }, () => {
      const [a, b] = [Math.exp(0.4 + 0.5 * stream.normal()), Math.exp(0.4 + 0.5 * stream.normal())];
      return Math.abs(a - 2) - Math.abs(a - b) / 2;
    });
    const mean = terms.reduce((sum, term) => sum + term, 0) / size;
    const variance = terms.reduce((sum, term) => sum + (term - mean) ** 2, 0) / (size - 1);
    expect(Math.abs(crpsLognormal(2, 0.4, 0.5) - mean)).toBeLessThan(4 * Math.sqrt(variance / size));
  });

  test("MASE of the last twelve months of AirPassengers (R)", () => {
    const [before, after] = [passengers.slice(0, 132), passengers.slice(132)];
    const last = after.map((value) => value - before[131]!);
    const seasonal = after.map((value, i) => value - before[120 + i]!);
    expect(off(scaledError(last, before), 3.15562599)).toBeLessThan(1e-8);
    expect(off(scaledError(last, before, 12), 2.49589491)).toBeLessThan(1e-8);
    expect(off(scaledError(seasonal, before, 12), 1.570881226)).toBeLessThan(1e-8);
  });

  test("the interval score adds 2/(1 - level) times the distance outside", () => {
    expect(intervalScore(5, 2, 6, 0.8)).toBe(4);
    expect(intervalScore(7, 2, 6, 0.8)).toBeCloseTo(4 + 10, 12);
    expect(intervalScore(1, 2, 6, 0.8)).toBeCloseTo(4 + 10, 12);
  });

  test("a score does not change with the unit but by its factor", () => {
    const number = fc.double({ min: -50, max: 50, noNaN: true });
    const size = fc.double({ min: 0.1, max: 10, noNaN: true });
    fc.assert(
      fc.property(number, number, size, size, (value, mean, deviation, factor) => {
        const whole = crpsNormal(factor * value, factor * mean, factor * deviation);
        expect(Math.abs(whole - factor * crpsNormal(value, mean, deviation))).toBeLessThan(
          1e-9 * (1 + whole),
        );
      }),
      { seed: 8 },
    );
  });
});
