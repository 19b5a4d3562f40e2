import { type CommonParameters, type Fit, problemOf, testWords } from "../../estimate/index.js";
import { chiSquareUpperTail } from "../../numeric/index.js";
import { notSeveralGroups } from "../refusals.js";

/** Whether all groups of a record have the same parameters of a rule. */
export interface SameParameters {
  readonly kind: "same-parameters";
  readonly combined: Fit;
  readonly separate: Fit;
  /** Exact for rules linear in their parameters: all groups with one sigma. Undefined where too few values are left. */
  readonly test: CommonParameters | undefined;
  /** Twice the difference of log-likelihoods, groups fitted separately having a sigma each. */
  readonly likelihoodRatio: {
    readonly statistic: number;
    readonly degreesOfFreedom: number;
    readonly probability: number;
  };
  readonly sentence: string;
}

/**
 * Asks whether the groups of a fit have the same parameters: the rule is fitted with common parameters and with each
 * group's own, initial states being each group's own in both.
 *
 * @param fit - of a record with several groups, fitted separately or combined; the other way is fitted here.
 * @throws {ModelError} `not-several-groups`, and `groups-not-together` for counts, censored values and errors in both.
 * @see Wilks, S. S. (1938), Annals of Mathematical Statistics 9, for the likelihood ratio.
 * @example sameParameters(flasksFit).test.degreesOfFreedom; // [2, 12]
 */
export function sameParameters(fit: Fit): SameParameters {
  const problem = problemOf(fit);
  if (fit.groups.length < 2 || problem.groups === "mixed") throw notSeveralGroups(fit.groups.length);
  const other = (groups: "separate" | "combined"): Fit =>
    problem.groups === groups ? fit : problem.refit({ groups });
  const [combined, separate] = [other("combined"), other("separate")];
  const statistic = Math.max(0, 2 * (separate.criteria.logLikelihood - combined.criteria.logLikelihood));
  const degreesOfFreedom = separate.criteria.counted - combined.criteria.counted;
  const probability = chiSquareUpperTail(statistic, degreesOfFreedom);
  const test = combined.commonParameters;
  return {
    kind: "same-parameters",
    combined,
    separate,
    test,
    likelihoodRatio: { statistic, degreesOfFreedom, probability },
    sentence: sentenceOf(test, probability, fit.groups.length),
  };
}

function sentenceOf(test: CommonParameters | undefined, likelihoodRatio: number, groups: number): string {
  const probability = test?.probability ?? likelihoodRatio;
  const p = likelihoodRatio < 0.001 ? "p below 0.001" : `p ${likelihoodRatio.toFixed(3)}`;
  const numbers = test === undefined ? `likelihood ratio, ${p}` : testWords(test);
  return probability < 0.05
    ? `Evidence that the ${groups} groups differ in their parameters (${numbers}): fit them with \`groups: "separate"\`.`
    : `No evidence that the ${groups} groups differ in their parameters (${numbers}).`;
}
