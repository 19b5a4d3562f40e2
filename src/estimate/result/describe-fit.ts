import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { Measures, Search } from "../problem/search.js";
import type { Optimum } from "../search/optimum.js";
import { longestLag } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import type { Criteria } from "./criteria.js";
import { estimatesOf } from "./estimate-of.js";
import { fitPoints } from "./fit-points.js";
import { fitUse } from "./fit-use.js";
import { fitWarnings } from "./fit-warnings.js";
import type { GroupFit } from "./group-fit.js";

/** What was searched in a group, or the group's part of what was searched in all. */
export type Searched = Pick<Search, "group" | "unknowns" | "rows" | "weightsAt" | "warnings">;

/** A group's optimum as a result to be read; without criteria where they are those of all groups. */
export function describeFit(
  rule: Rule,
  searched: Searched,
  options: FitOptions,
  found: Optimum,
  measures: Omit<Measures, "criteria"> & { readonly criteria?: Criteria },
): GroupFit {
  const { criteria, sigma, exact, overdispersion } = measures;
  const { group, unknowns, rows } = searched;
  const own = { values: rows.count, unknowns: unknowns.names.length };
  const size = measures.together ?? own;
  const left = exact ? size : own;
  const degreesOfFreedom = left.values - left.unknowns;
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
    ...(criteria && { criteria }),
    ...(overdispersion && { overdispersion }),
    cut: found.cut.cut,
    stop: found.stop,
    points,
    used: fitUse(rule, group, points),
    rivals: found.rivals.map(({ estimates, value }) => ({
      estimates: Array.from(estimates),
      behind: (value - found.value) / found.cut.variance / 2,
    })),
  };
  const warnings = fitWarnings(fitted, { rule, options, unknowns, found, size });
  return { ...fitted, warnings: [...warnings, ...(searched.warnings?.(found.at) ?? [])] };
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
      options.errors === "process" || Number.isNaN(unknowns.initial[s]!)
        ? group.values[state]![first]!
        : unknowns.initial[s]!,
    ]),
  );
}
