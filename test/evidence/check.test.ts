import { describe, expect, test } from "vitest";
import { fit } from "../../src/estimate/index.js";
import { check } from "../../src/evidence/index.js";
import { randomStream } from "../../src/numeric/index.js";
import { observations, tableOf } from "../../src/record/index.js";
import { recurrence } from "../../src/rule/index.js";
import { culture } from "./culture.js";
import { drawn } from "./drawn.js";
import { series } from "./series.js";

const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");

describe("check", () => {
  // Source: computed with R 4.2 and SciPy for a made-up culture of 21 readings; printed to 3 decimals.
  test("lag-1 autocorrelation of residuals is -0.285 one-step and 0.152 along the trajectory (R and SciPy)", () => {
    const along = check(fit(sheltered, culture, { errors: "observation", distribution: "lognormal" }));
    const steps = check(fit(sheltered, culture, { errors: "process", distribution: "lognormal" }));
    const lagOne = (checked: typeof along): number => checked.groups[0]!.tests[0]!.statistic;
    expect(Math.abs(lagOne(along) - 0.152)).toBeLessThan(5e-4);
    expect(Math.abs(lagOne(steps) + 0.285)).toBeLessThan(5e-4);
    expect(along.groups[0]!.errors!.lagOne.process).toBe(lagOne(steps));
  });

  // Source: the binomial distribution; with 400 refits the share of 95% lies within 4 errors, 0.044, of it.
  test("finds the parameters of a linear rule again without bias, at the stated level", () => {
    const rule = recurrence("N[t+1] = N + c");
    const stream = randomStream(3);
    const values = Float64Array.from({ length: 30 }, (_, t) => 20 + 1.5 * t + stream.normal());
    const checked = check(fit(rule, series(values), { errors: "observation" }), { resamples: 400 });
    for (const unknown of checked.groups[0]!.recovery!.parameters) {
      expect(Math.abs(unknown.coverage - 0.95)).toBeLessThan(0.044);
      expect(Math.abs(unknown.bias)).toBeLessThan((4 * unknown.deviation) / Math.sqrt(400));
    }
  });

  test("says that a parameter hangs on one row", () => {
    const values = drawn(sheltered, [1.5, 100], 5, 24, 0.02, "observation", randomStream(5));
    values[23] = 125;
    const checked = check(fit(sheltered, series(values), { errors: "observation" }));
    expect(checked.groups[0]!.concerns.join(" ")).toMatch(
      /Fitted without the last row, K moves by \d+\.\d standard errors/,
    );
  });

  test("gives the same digits for the same seed", () => {
    const fitted = fit(sheltered, culture, { errors: "observation", distribution: "lognormal" });
    expect(check(fitted, { seed: 4 })).toEqual(check(fitted, { seed: 4 }));
    expect(check(fitted, { seed: 4 }).groups[0]!.recovery).not.toEqual(
      check(fitted, { seed: 5 }).groups[0]!.recovery,
    );
  });

  test("refuses a rule that reproduces the record exactly", () => {
    const exact = fit(recurrence("N[t+1] = N + c"), series([10, 12, 14, 16, 18, 20]), { errors: "process" });
    expect(() => check(exact)).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: "N[t+1] = N + c" reproduces the record exactly, so there is no scatter to judge it by. Where values are exact but for rounding, count the rows that a rule reproduces; where they should scatter, look whether the column was computed.]`,
    );
  });

  test("refuses fewer than fifty refits", () => {
    const fitted = fit(sheltered, culture, { errors: "observation", distribution: "lognormal" });
    expect(() => check(fitted, { resamples: 10 })).toThrowErrorMatchingInlineSnapshot(
      `[ModelError: Recovery needs at least 50 refits to tell a share of intervals; 10 given. Leave { refits } out for 200.]`,
    );
  });
});

describe("advice on the kind of error", () => {
  // Growth records of 40 readings: right in three of four, wrong in at most one of ten, as over 1,000 records a kind
  // in the benchmark; here 40 a kind, which the seed fixes.
  test("finds where the scatter lies, or leaves it open", () => {
    for (const errors of ["process", "observation"] as const) {
      const stream = randomStream(17);
      const found = Array.from({ length: 40 }, () => {
        const values = drawn(sheltered, [1.4, 100], 5, 40, 0.1, errors, stream);
        const fitted = fit(sheltered, series(values), { errors, distribution: "lognormal" });
        return check(fitted, { resamples: 50 }).groups[0]!.errors?.kind ?? "undecided";
      });
      expect(found.filter((kind) => kind === errors).length).toBeGreaterThanOrEqual(30);
      expect(found.filter((kind) => kind !== errors && kind !== "undecided").length).toBeLessThanOrEqual(4);
    }
  });
});

describe("fits that are not of least squares", () => {
  test("both kinds of error at once are tried on drawn records too", () => {
    const values = drawn(sheltered, [1.4, 100], 8, 40, 0.08, "process", randomStream(8));
    const checked = check(fit(sheltered, series(values), { errors: "both", distribution: "lognormal" }), {
      resamples: 50,
    });
    const { resamples: refits, parameters: unknowns } = checked.groups[0]!.recovery!;
    expect(refits).toBe(50);
    expect(unknowns.map(({ name }) => name)).toEqual(["R", "K", "process error", "observation error"]);
    for (const { coverage } of unknowns) expect(coverage).toBeGreaterThan(0.7);
  });

  test("counts are drawn again and refitted", () => {
    const values = drawn(sheltered, [1.4, 100], 8, 30, 0.05, "observation", randomStream(3)).map(Math.round);
    const checked = check(fit(sheltered, series(values), { errors: "observation", distribution: "poisson" }));
    const { resamples, parameters } = checked.groups[0]!.recovery!;
    expect(resamples).toBe(200);
    for (const { coverage } of parameters) expect(coverage).toBeGreaterThan(0.85);
  });
});

describe("lack of fit against replicates", () => {
  // Source: one-way analysis of variance by SciPy 1.17 (stats.f_oneway and a line by stats.linregress) on the rows below.
  test("F is the misfit of means over the scatter within replicates", () => {
    const rows = [0, 1, 2, 3, 4, 5].flatMap((t) => [-0.3, 0.1, 0.2].map((e, i) => ({ t, e, i })));
    const level = (t: number): number => 10 + 2 * t + (t % 2 === 0 ? 0.4 : -0.4);
    const table = tableOf({
      t: rows.map(({ t }) => t),
      well: rows.map(({ i }) => i),
      N: rows.map(({ t, e }) => level(t) + e),
    });
    const record = observations(table, {
      period: "t",
      step: { every: 1, of: "hour" },
      value: "N",
      replicates: "well",
    });
    const fitted = fit(recurrence("N[t+1] = N + c"), record, { errors: "observation" });
    const [found] = check(fitted).groups[0]!.lackOfFit;
    expect(found!.degreesOfFreedom).toEqual([4, 12]);
    expect(Math.abs(found!.ratio / 9.40408163265304 - 1)).toBeLessThan(1e-8);
    expect(found!.sentence).toMatch(/^The rule misses the readings by more than replicates differ/);
  });
});
