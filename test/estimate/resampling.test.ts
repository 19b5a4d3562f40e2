import { describe, expect, test } from "vitest";
import { bootstrap, fit, gridInterval } from "../../src/estimate/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "./record.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const values = [10.1, 13.4, 18.9, 24.3, 32.2, 40.5, 50.1, 58.2, 67.9, 74.8, 81.2, 86.3];
const fitted = fit(sheltered, record({ N: values }), { errors: "observation" });

describe("bootstrap", () => {
  test.each(["parametric", "residual", "block"] as const)(
    "by %s errors agrees with the curvature",
    (errors) => {
      const { rows, used } = bootstrap(fitted, { errors, resamples: 400 });
      expect(used).toBe(400);
      rows.forEach((row, i) => {
        const { standardError, value } = fitted.groups[0]!.estimates[i]!;
        // A standard error from 400 refits is itself known to 1/sqrt(800) = 3.5%; residuals drawn in runs are fewer.
        const tolerance = errors === "parametric" ? 0.15 : 0.5;
        expect(Math.abs(row.standardError / standardError! - 1)).toBeLessThan(tolerance);
        expect(row.interval.lower!).toBeLessThan(value);
        expect(row.interval.upper!).toBeGreaterThan(value);
      });
    },
  );

  test("repeats its digits for a seed, and ends when its signal is aborted", () => {
    const once = bootstrap(fitted, { resamples: 200, seed: 9 });
    expect(bootstrap(fitted, { resamples: 200, seed: 9 }).rows).toEqual(once.rows);
    const controller = new AbortController();
    const reported: number[] = [];
    const run = (): unknown =>
      bootstrap(fitted, {
        resamples: 900,
        signal: controller.signal,
        onProgress: (done, of) => {
          reported.push(done);
          if (done === 300) controller.abort();
          return of < 0;
        },
      });
    expect(run).toThrow(expect.objectContaining({ code: "interrupted" }));
    expect(reported).toHaveLength(300);
  });

  test("refuses what it cannot resample, and too few draws", () => {
    const level = recurrence("D[t+1] = D");
    const poisson = { errors: "observation", distribution: "poisson" } as const;
    const D = [3, 5, 4, 6, 2];
    const counts = fit(level, record({ D }), poisson);
    expect(() => bootstrap(counts, { errors: "residual" })).toThrow(
      expect.objectContaining({ code: "no-residuals" }),
    );
    const weighted = fit(level, record({ D }, { weights: Float64Array.of(1, 1, 2, 1, 1) }), poisson);
    expect(() => bootstrap(weighted)).toThrow(expect.objectContaining({ code: "not-simulated" }));
    expect(() => bootstrap(fitted, { resamples: 5 })).toThrow(
      expect.objectContaining({ code: "too-few-draws" }),
    );
  });
});

const holds = (
  { lower = -9, upper = 9 }: { lower?: number | undefined; upper?: number | undefined },
  truth: number,
): boolean => lower <= truth && truth <= upper;

// Source: the mean of n Poisson counts of mean m has the standard deviation sqrt(m/n).
test("counts are drawn from their distribution", () => {
  const D = [3, 5, 4, 6, 2, 7, 4, 1, 5, 3];
  const counts = fit(recurrence("D[t+1] = D"), record({ D }), {
    errors: "observation",
    distribution: "poisson",
  });
  const [row] = bootstrap(counts, { resamples: 800 }).rows;
  expect(row!.estimate).toBeCloseTo(4, 6);
  // A standard error from 800 refits is known to 1/sqrt(1600) = 2.5%.
  expect(Math.abs(row!.standardError / Math.sqrt(4 / 10) - 1)).toBeLessThan(0.1);
});

describe("gridInterval", () => {
  test("keeps its coverage near a unit root, where the profile loses it", () => {
    const rule = recurrence("x[t+1] = a + b*x");
    const stream = randomStream(12);
    const covered = { grid: 0, profile: 0 };
    const records = 40;
    for (let k = 0; k < records; k++) {
      const x = [0];
      for (let t = 0; t < 30; t++) x.push(x[t]! + stream.normal());
      const line = fit(rule, record({ x }), { errors: "process" });
      const { profile } = line.groups[0]!.estimates[1]!;
      const grid = gridInterval(line, "b", { resamples: 99 });
      if (holds(profile, 1)) covered.profile++;
      if (holds(grid, 1)) covered.grid++;
    }
    // 95% of 40 is 38, with a binomial standard deviation of 1.4; three of them below.
    expect(covered.grid).toBeGreaterThanOrEqual(34);
    expect(covered.profile).toBeLessThan(covered.grid);
  });

  test("agrees with the profile where the rule is nearly linear in its parameters", () => {
    const { profile, standardError } = fitted.groups[0]!.estimates[0]!;
    const grid = gridInterval(fitted, "R", { resamples: 399 });
    expect(Math.abs(grid.lower! - profile.lower!)).toBeLessThan(0.4 * standardError!);
    expect(Math.abs(grid.upper! - profile.upper!)).toBeLessThan(0.4 * standardError!);
  });
});

test("a state-space fit is resampled from both its errors", () => {
  const stream = randomStream(21);
  const x = [5];
  for (let t = 1; t < 50; t++) x.push(2 + 0.6 * x[t - 1]! + stream.normal());
  const read = x.map((value) => value + 0.7 * stream.normal());
  const both = fit(recurrence("x[t+1] = a + b*x"), record({ x: read }), { errors: "both" });
  const { rows, used } = bootstrap(both, { resamples: 100 });
  expect(used).toBeGreaterThan(90);
  const slope = rows.find(({ name }) => name === "b")!;
  expect(slope.interval.lower!).toBeLessThan(slope.estimate);
  expect(slope.interval.upper!).toBeGreaterThan(slope.estimate);
  expect(() => bootstrap(both, { errors: "block" })).toThrow(
    expect.objectContaining({ code: "no-residuals" }),
  );
});
