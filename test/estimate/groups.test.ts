import { describe, expect, test } from "vitest";
import { estimates, type Fit, fit } from "../../src/estimate/index.js";
import { leastSquares, randomStream } from "../../src/numeric/index.js";
import { recurrence } from "../../src/rule/index.js";
import { type Columns, record } from "./record.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const path = (R: number, K: number, first: number, t: number): number =>
  (K * first) / (first + (K - first) * R ** -t);

/** Cultures whose rates come from a normal population. */
function cultures(count: number, mean: number, spread: number, seed: number): Record<string, Columns> {
  const stream = randomStream(seed);
  const made = Array.from({ length: count }, (_, flask) => {
    const rate = mean + spread * stream.normal();
    const N = Array.from({ length: 15 }, (_, t) => path(rate, 100, 5, t) * Math.exp(0.05 * stream.normal()));
    return [`flask ${flask + 1}`, { N }] as const;
  });
  return Object.fromEntries(made);
}
const options = { errors: "observation", distribution: "lognormal" } as const;
const population = (fitted: Fit, name: string) => fitted.population!.find((each) => each.name === name)!;

describe("groups of a record", () => {
  const three = cultures(3, 1.5, 0.02, 8);

  test("separate: each group as if it were alone", () => {
    const apart = fit(sheltered, record(three), options);
    const alone = fit(sheltered, record(three["flask 2"]!), options);
    expect(apart.groups[1]!.estimates.map(({ value }) => value)).toEqual(
      alone.groups[0]!.estimates.map(({ value }) => value),
    );
  });

  test("combined: one least-squares problem with a first value for every group", () => {
    const together = fit(sheltered, record(three), { ...options, groups: "combined" });
    const series = Object.values(three).map(({ N }) => N!);
    const direct = leastSquares({
      residuals: ([R, K, ...firsts]) =>
        series.flatMap((N, g) => N.map((value, t) => Math.log(value / path(R!, K!, firsts[g]!, t)))),
      start: [1.5, 100, 5, 5, 5],
    });
    ["R", "K"].forEach((name, i) => {
      expect(Math.abs(population(together, name).value / direct.estimates[i]! - 1)).toBeLessThan(1e-8);
      expect(
        Math.abs(population(together, name).standardError! / direct.standardErrors[i]! - 1),
      ).toBeLessThan(1e-5);
    });
    expect(together.groups.map(({ estimates }) => estimates[0]!.value)).toEqual(
      new Array(3).fill(population(together, "R").value),
    );
  });

  test("mixed: the population's mean and spread lie where the groups were drawn from", () => {
    const mixed = fit(sheltered, record(cultures(12, 1.5, 0.08, 3)), { ...options, groups: "mixed" });
    const mean = population(mixed, "R");
    const spread = population(mixed, "between-group sd of R");
    expect(Math.abs(mean.value - 1.5)).toBeLessThan(3 * mean.standardError!);
    expect(spread.profile.lower!).toBeLessThan(0.08);
    expect(spread.profile.upper!).toBeGreaterThan(0.08);
    // Pairs of own estimates and group means: those of the groups lie closer together than when fitted apart.
    const apart = fit(sheltered, record(cultures(12, 1.5, 0.08, 3)), { ...options, intervals: "none" });
    const width = (fitted: Fit): number => {
      const rates = fitted.groups.map(({ estimates }) => estimates[0]!.value);
      return Math.max(...rates) - Math.min(...rates);
    };
    expect(width(mixed)).toBeLessThan(width(apart));
  });

  // Source: Kass and Steffey (1989): the variance of a group's own value is that with the mean known, plus the mean's own
  // variance times the square of the share with which the group follows it. For a straight line with a level of each
  // group's own both are closed forms of X'X.
  test("mixed: a group's standard error carries the uncertainty of the population's mean", () => {
    const stream = randomStream(17);
    const lines = Object.fromEntries(
      [0.8, 1.1, 1.5, 0.9, 1.2].map((slope, g) => [
        `line ${g + 1}`,
        { x: Array.from({ length: 6 + g }, (_, t) => 10 * g + slope * t + 0.5 * stream.normal()) },
      ]),
    );
    const mixed = fit(recurrence("x[t+1] = x + c"), record(lines), {
      errors: "observation",
      groups: "mixed",
    });
    const [mean, spread, sigma] = ["c", "between-group sd of c", "sigma"].map((name) =>
      population(mixed, name),
    );
    for (const group of mixed.groups) {
      const n = group.count;
      const sums = { tt: ((n - 1) * n * (2 * n - 1)) / 6, t: ((n - 1) * n) / 2 };
      const weight = 1 / spread!.value ** 2;
      // Inverse of [tt/s^2 + 1/spread^2, t/s^2; t/s^2, n/s^2], its first entry.
      const s2 = sigma!.value ** 2;
      const [a, b, d] = [sums.tt / s2 + weight, sums.t / s2, n / s2];
      const known = d / (a * d - b * b);
      const whole = known + (known * weight * mean!.standardError!) ** 2;
      expect(Math.abs(group.estimates[0]!.standardError! / Math.sqrt(whole) - 1)).toBeLessThan(1e-5);
    }
  });

  test("the view of estimates shows what holds for all groups once, or their means beside the groups' own", () => {
    const together = fit(sheltered, record(three), { ...options, groups: "combined" });
    expect(estimates(together).map(({ group, name }) => `${group}: ${name}`)).toEqual([
      "all groups: R",
      "all groups: K",
      ...["flask 1", "flask 2", "flask 3"].map((flask) => `${flask}: N[0]`),
    ]);
    const mixed = fit(sheltered, record(three), { ...options, groups: "mixed" });
    expect(
      estimates(mixed)
        .map(({ group, name }) => `${group}: ${name}`)
        .slice(0, 6),
    ).toEqual([
      "all groups: R",
      "all groups: K",
      "all groups: between-group sd of R",
      "all groups: between-group sd of K",
      "all groups: sigma",
      "flask 1: R",
    ]);
  });

  test("too few groups for a population, and counts together, are refused", () => {
    const two = record(cultures(2, 1.5, 0.02, 8));
    expect(() => fit(sheltered, two, { ...options, groups: "mixed" })).toThrow(
      expect.objectContaining({ code: "too-few-groups" }),
    );
    expect(() => fit(sheltered, two, { errors: "both", groups: "combined" })).toThrow(
      expect.objectContaining({ code: "groups-not-together" }),
    );
  });
});
