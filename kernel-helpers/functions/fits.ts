import {
  type Fit as EngineFit,
  type EstimateRow,
  estimates as estimatesOf,
  type FitOptions,
  fit as fitRule,
  type PointRow,
  points as pointsOf,
  type SummaryRow,
  summary as summaryOf,
} from "../../src/estimate/index.js";
import { freezeDeep, frozenCopy } from "../../src/numeric/index.js";
import type { Observations } from "../../src/record/index.js";
import type { Rule } from "../../src/rule/index.js";
import { checkCall } from "../options/index.js";
import type { Fit } from "../results/index.js";
import { caseLog } from "./case-log.js";
import { ruleInFull } from "./rule-title.js";
import { presentFit } from "./show-fit.js";

/**
 * Estimates the parameters of a rule from a record; the result shows its estimates, its conventions and warnings,
 * and observed against fitted values. Of a single group `values` has the estimates by name, and `interval("r")` the
 * limits of one.
 *
 * The engine's `fit` says what is minimised and which errors are thrown.
 *
 * @example fit(crowding, counts, { errors: "observation", distribution: "lognormal" });
 */
export function fit(rule: Rule, observations: Observations, options: FitOptions): Fit {
  checkCall("fit", arguments);
  const fitted = presentFit(fitRule(rule, observations, frozenCopy(options)));
  caseLog.noteStep(
    `fit ${ruleInFull(rule)} with errors: ${options.errors}, distribution: ${options.distribution ?? "normal"}`,
  );
  return fitted;
}

/**
 * Every unknown of every group of a fit, a row each: estimate, standard error or none where the record does not
 * determine it, intervals.
 *
 * @example estimates(fitted)[0].name; // "R"
 */
export function estimates(fit: EngineFit): readonly EstimateRow[] {
  checkCall("estimates", arguments);
  return freezeDeep(estimatesOf(fit));
}

/**
 * Every compared value of every group of a fit, a row each: observed, fitted, residual, leverage.
 *
 * @example points(fitted).length; // counts.groups[0].index.length
 */
export function points(fit: EngineFit): readonly PointRow[] {
  checkCall("points", arguments);
  return freezeDeep(pointsOf(fit));
}

/**
 * A row a group of a fit: size, scatter, likelihood, criteria, and why the search stopped.
 *
 * @example summary(fitted)[0].stop; // "converged"
 */
export function summary(fit: EngineFit): readonly SummaryRow[] {
  checkCall("summary", arguments);
  return freezeDeep(summaryOf(fit));
}
