import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";
import type { Optimum } from "../search/optimum.js";
import { longestLag } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import type { Criteria } from "./criteria.js";
import { estimatesOf } from "./estimate-of.js";
import { fitPoints } from "./fit-points.js";
import { fitWarnings } from "./fit-warnings.js";
import type { GroupFit } from "./group-fit.js";

/** What differs between fits by least squares and by other likelihoods. */
export interface Measures {
  readonly criteria: Criteria;
  /** Where the spread is an unknown of its own. */
  readonly sigma: number | undefined;
  /** Whether intervals and errors are those of n - p degrees of freedom (least squares), or of large samples. */
  readonly exact: boolean;
}

/** A group's optimum as a result to be read. */
export function describeFit(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  rows: FitRows,
  found: Optimum,
  { criteria, sigma, exact }: Measures,
): GroupFit {
  const degreesOfFreedom = rows.count - unknowns.names.length;
  const points = fitPoints(rule, group, rows, found);
  const sumOfSquares = points.reduce((sum, { residual }, i) => sum + (residual * rows.roots[i]!) ** 2, 0);
  place(unknowns, found.at);
  const fitted = {
    group: group.name,
    estimates: estimatesOf(
      rule,
      unknowns,
      found,
      options.level ?? 0.95,
      exact ? degreesOfFreedom : undefined,
    ),
    covariance: Array.from(found.covariance),
    parameters: Object.fromEntries(rule.parameters.map((name, c) => [name, unknowns.parameters[c]!])),
    initial: initialOf(rule, group, options, unknowns),
    sumOfSquares,
    count: rows.count,
    degreesOfFreedom,
    sigma: sigma ?? Math.sqrt(sumOfSquares / degreesOfFreedom),
    criteria,
    cut: found.cut.cut,
    stop: found.stop,
    points,
    rivals: found.rivals.map(({ estimates, value }) => ({
      estimates: Array.from(estimates),
      behind: (value - found.value) / found.cut.variance / 2,
    })),
  };
  return { ...fitted, warnings: fitWarnings(fitted, { rule, options, unknowns, found }) };
}

/** Values of the states where the path begins: estimated or given ones, or the first recorded ones. */
function initialOf(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
): Readonly<Record<string, number>> {
  const first = Math.max(0, group.index.indexOf(longestLag(rule)));
  return Object.fromEntries(
    rule.states.map((state, s) => [
      state,
      options.errors === "observation" ? unknowns.initial[s]! : group.values[state]![first]!,
    ]),
  );
}
