import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { Filtering } from "../state-space/state-space.js";
import { stateSpaceSearch } from "../state-space/state-space-search.js";
import { leastSquaresSearch } from "./least-squares-search.js";
import { likelihoodSearch } from "./likelihood-search.js";
import { robustSearch } from "./robust-search.js";
import type { FitKind, Search } from "./search.js";

/** How a fit of groups by themselves looks at one of them. */
export function kindOf(rule: Rule, group: ObservedGroup, options: FitOptions): FitKind {
  if (options.errors === "both") return "state-space";
  const counts = options.distribution === "poisson" || options.distribution === "negative-binomial";
  return counts || isCensored(rule, group) ? "likelihood" : "least-squares";
}

export function isCensored(rule: Rule, group: ObservedGroup): boolean {
  return rule.states.some((state) => group.censoring?.[state]?.some((mark) => mark !== 0));
}

/** The search for one group by itself. */
export function searchOf(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  filtering?: Filtering,
): Search {
  const kind = kindOf(rule, group, options);
  if (kind === "state-space") return stateSpaceSearch(rule, group, options, filtering);
  if (kind === "likelihood") return likelihoodSearch(rule, group, options);
  return options.robust === true
    ? robustSearch(rule, group, options)
    : leastSquaresSearch(rule, group, options);
}
