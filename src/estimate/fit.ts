import type { Warning } from "../numeric/index.js";
import type { Observations } from "../record/index.js";
import type { Rule } from "../rule/index.js";
import { type CommonParameters, commonParametersWarnings } from "./fits/common-parameters.js";
import { fitGroups } from "./fits/fit-group.js";
import { checkOptions } from "./options/check-options.js";
import { conventionsOf } from "./options/conventions.js";
import type { FitOptions } from "./options/fit-options.js";
import { inputWarnings } from "./options/input-warnings.js";
import { matchStates } from "./options/match-states.js";
import { matchNotes, unitWarnings } from "./options/record-against-rule.js";
import { recordWarnings } from "./options/record-warnings.js";
import { type FitProblem, fitProblem } from "./problem/fit-problem.js";
import { refuseMissingArgument } from "./refusals.js";
import type { Criteria } from "./result/criteria.js";
import type { Estimate } from "./result/estimate-of.js";
import type { GroupFit } from "./result/group-fit.js";

/** A rule with its parameters estimated from a record, each group on its own. */
export interface Fit {
  readonly kind: "fit";
  readonly rule: Rule;
  /** The record, its states named as the rule names them. */
  readonly observations: Observations;
  readonly options: FitOptions;
  readonly groups: readonly GroupFit[];
  /** Log-likelihood, AIC, AICc and BIC of the whole fit, however many groups. */
  readonly criteria: Criteria;
  /** Of groups fitted together: the parameters that hold for all, or their means and spreads among the groups. */
  readonly population?: readonly Estimate[];
  /** Of a combined fit: whether the groups have their parameters in common. */
  readonly commonParameters?: CommonParameters;
  readonly warnings: readonly Warning[];
  /** The conventions behind the numbers, as printed with every table of the fit. */
  readonly conventions: readonly string[];
}

/**
 * Estimates the parameters of a rule from a record by least squares.
 *
 * `errors: "observation"` minimises sum (y_t - x_t)^2 over the whole trajectory x of the rule, its initial
 * state among the unknowns; `errors: "process"` minimises sum (y_{t+k} - f^k(y_t))^2 over recorded pairs.
 * With `distribution: "lognormal"` the differences are of logarithms.
 *
 * @param rule - from `recurrence(...)`; unit of a state = unit of its recorded values.
 * @param observations - per group at least as many values (pairs) as unknowns + 3; gaps stay gaps.
 * @returns estimates with standard errors (sigma^2 = RSS/(n - p)), profile and Wald intervals, residuals, stop
 *   reason and warnings, a group at a time.
 * @throws {ModelError} `argument-missing` | `errors-not-stated` | `unknown-spread` | `bad-spread` | `factor-without-trajectory` |
 *   `robust-not-by-squares` | `rule-jumps` |
 *   `states-not-recorded` | `too-few-observations` | `no-change` | `no-logarithm` | `not-a-count` | `all-censored` |
 *   `no-finite-start` | `part-of-start` | `bounds-reversed` | `factor-name-taken` | `censored-in-filter` | `unit-scales-differ` | `unknown-name` | `start-outside-bounds` | `input-not-recorded` | `input-missing-in-period`.
 * @see Bates, D. M. and Watts, D. G. (1988), Nonlinear Regression Analysis and Its Applications, chapters 2 and 6.
 * @example
 * const crowding = recurrence("ΔN = r*N*(1 - N/K)");
 * const counts = observations({ hour: [0, 1, 2, 3, 4, 5, 6], N: [10, 18, 31, 50, 69, 85, 93] }, { period: "hour", step: { every: 1, of: "hour" }, value: "N" });
 * fit(crowding, counts, { errors: "observation" }).groups[0].stop.kind; // "converged"
 */
export function fit(rule: Rule, observations: Observations, options: FitOptions): Fit {
  if (rule?.kind !== "rule") throw refuseMissingArgument("rule");
  if (observations?.kind !== "observations") throw refuseMissingArgument("record");
  checkOptions(rule, options);
  const matched = matchStates(rule, observations);
  const unitsDisagree = unitWarnings(rule, matched, options);
  const { groups, criteria, population, commonParameters } = fitGroups(rule, matched.groups, options);
  const fitted: Fit = {
    kind: "fit",
    rule,
    observations: matched,
    options: { ...options },
    groups,
    criteria,
    ...(population && { population }),
    ...(commonParameters && { commonParameters }),
    warnings: [
      ...rule.findings,
      ...unitsDisagree,
      ...recordWarnings(matched),
      ...inputWarnings(rule, matched, options),
      ...commonParametersWarnings(commonParameters),
    ],
    conventions: [...conventionsOf(options, groups), ...matchNotes(rule, observations)],
  };
  problems.set(fitted, fitProblem(fitted, fit));
  return fitted;
}

const problems = new WeakMap<Fit, FitProblem>();

/**
 * What a fit searched, ready to be searched again. Of a fit that was copied, or that came from a worker or a file, it is
 * made again from the rule, the record and the options.
 */
export function problemOf(fitted: Fit): FitProblem {
  const known = problems.get(fitted);
  if (known !== undefined) return known;
  const made = fitProblem(fitted, fit);
  problems.set(fitted, made);
  return made;
}
