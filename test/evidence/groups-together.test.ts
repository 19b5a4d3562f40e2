// Expected values: NumPy 2.4.6 (linalg.lstsq of ln N on time, with a common and with each group's own slope) and SciPy
// 1.17.1 (stats.f.sf, stats.chi2.sf), printed to twelve digits; the record is invented.
import { describe, expect, test } from "vitest";
import { type Fit, type FitOptions, fit, summary } from "../../src/estimate/index.js";
import { compare, sameParameters } from "../../src/evidence/index.js";
import { recurrence } from "../../src/rule/index.js";
import { record } from "../estimate/record.js";

const geometric = recurrence("N[t+1] = R*N");
const alike = {
  A: { N: [10, 12.4, 14.1, 17.9, 20.6, 25.4, 30.1] },
  B: { N: [20, 23.1, 29.4, 33.9, 42.5, 49.8, 62.0] },
  C: { N: [5, 5.9, 7.6, 8.4, 10.7, 12.2, 15.4] },
};
const unlike = { ...alike, C: { N: [5, 5.2, 5.9, 6.0, 6.7, 6.9, 7.6] } };
const onLog: FitOptions = { errors: "observation", distribution: "lognormal" };
const fitted = (groups: "separate" | "combined", columns = alike): Fit =>
  fit(geometric, record(columns), { ...onLog, groups });

describe("criteria of a fit with several groups", () => {
  test("combined: one likelihood, on the fit and not on its groups", () => {
    const { criteria, groups, population } = fitted("combined");
    expect(population![0]!.value).toBeCloseTo(1.2039058155508808, 9);
    expect(criteria).toMatchObject({ counted: 5, count: 21 });
    expect(criteria.logLikelihood).toBeCloseTo(48.74722029006745, 8);
    expect(criteria.aic).toBeCloseTo(-87.4944405801349, 8);
    expect(criteria.aicCorrected).toBeCloseTo(-83.4944405801349, 8);
    expect(criteria.bic).toBeCloseTo(-82.27182839151779, 8);
    for (const group of groups) expect(group.criteria).toBeUndefined();
    expect(summary(fitted("combined"))).toHaveLength(1);
  });

  test("separate: the groups' own, which add up", () => {
    const { criteria, groups } = fitted("separate");
    expect(criteria.logLikelihood).toBeCloseTo(50.030724299564, 8);
    expect(criteria.aic).toBeCloseTo(-82.061448599128, 8);
    expect(criteria.aicCorrected).toBeCloseTo(-58.061448599128, 8);
    expect(criteria.bic).toBeCloseTo(-82.54825725763, 8);
    expect(groups.reduce((sum, group) => sum + group.criteria!.aic, 0)).toBeCloseTo(criteria.aic, 10);
  });

  test("compare holds a combined fit against a separate one by them, and tells their likelihood ratio", () => {
    const compared = compare([fitted("combined"), fitted("separate")]);
    expect(compared.rows.map(({ parameters }) => parameters)).toEqual([4, 6]);
    expect(compared.rows[1]!.difference).toBeCloseTo(-58.061448599128 + 83.4944405801349, 7);
    const [ratio] = compared.likelihoodRatios;
    expect(ratio!.statistic).toBeCloseTo(2.567008018993377, 7);
    expect(ratio!.degreesOfFreedom).toBe(4);
    expect(ratio!.probability).toBeCloseTo(0.6326784903560323, 7);
  });
});

describe("the same parameters for all groups", () => {
  test.each(["separate", "combined"] as const)("asked of a %s fit: F and likelihood ratio", (groups) => {
    const { test: found, likelihoodRatio, sentence } = sameParameters(fitted(groups));
    expect(found!.statistic).toBeCloseTo(0.41107124362090014, 7);
    expect(found!.degreesOfFreedom).toEqual([2, 15]);
    expect(found!.probability).toBeCloseTo(0.6701850851684857, 7);
    expect(likelihoodRatio.statistic).toBeCloseTo(2.567008018993377, 7);
    expect(sentence).toBe(
      "No evidence that the 3 groups differ in their parameters (F 0.411 on 2 and 15, p 0.670).",
    );
  });

  test("a combined fit of groups that differ says so", () => {
    const combined = fitted("combined", unlike);
    expect(combined.commonParameters!.statistic / 227.0344407168566 - 1).toBeCloseTo(0, 6);
    expect(combined.warnings.map(({ code }) => code)).toContain("groups-differ");
    expect(fitted("combined").warnings.map(({ code }) => code)).not.toContain("groups-differ");
  });

  test("is not asked of one group", () => {
    expect(() => sameParameters(fit(geometric, record(alike.A), onLog))).toThrow(
      expect.objectContaining({ code: "not-several-groups" }),
    );
  });
});
