import type { ObservedGroup } from "../record/index.js";
import type { Rule } from "../rule/index.js";
import { checkGroup } from "./check-group.js";
import type { FitOptions } from "./fit-options.js";
import type { GroupFit } from "./group-fit.js";
import { likelihoodFit } from "./likelihood-fit.js";
import { squaresFit } from "./squares-fit.js";
import { stateSpaceFit } from "./state-space-fit.js";
import { unknownsOf } from "./unknowns.js";

/** Fits a rule to one group of a record. */
export function fitGroup(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  checkGroup(rule, group, options, unknownsOf(rule, options));
  if (options.errors === "both") return stateSpaceFit(rule, group, options);
  const counts = options.spread === "poisson" || options.spread === "negative-binomial";
  const censored = rule.states.some((state) => group.censoring?.[state]?.some((mark) => mark !== 0));
  return counts || censored ? likelihoodFit(rule, group, options) : squaresFit(rule, group, options);
}
