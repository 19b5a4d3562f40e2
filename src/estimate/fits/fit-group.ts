import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { checkGroup } from "../options/check-group.js";
import { bySquares, type FitOptions } from "../options/fit-options.js";
import { refuseTogether } from "../refusals.js";
import type { Estimate } from "../result/estimate-of.js";
import type { GroupFit } from "../result/group-fit.js";
import { stateSpaceFit } from "../state-space/state-space-fit.js";
import { unknownsOf } from "../unknowns/unknowns.js";
import { combinedFit } from "./combined-fit.js";
import { likelihoodFit } from "./likelihood-fit.js";
import { mixedFit } from "./mixed-fit.js";
import { squaresFit } from "./squares-fit.js";

/** Fits a rule to one group of a record. */
function fitGroup(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  checkGroup(rule, group, options, unknownsOf(rule, options));
  if (options.errors === "both") return stateSpaceFit(rule, group, options);
  return bySquares(options) && !isCensored(rule, group)
    ? squaresFit(rule, group, options)
    : likelihoodFit(rule, group, options);
}

/** Fits all groups of a record: each on its own, with the same parameters, or with parameters from a population. */
export function fitGroups(
  rule: Rule,
  groups: readonly ObservedGroup[],
  options: FitOptions,
): { readonly groups: readonly GroupFit[]; readonly population?: readonly Estimate[] } {
  const { groups: how = "separate" } = options;
  if (how === "separate" || (how === "combined" && groups.length === 1))
    return { groups: groups.map((group) => fitGroup(rule, group, options)) };
  if (bySquares(options) && !groups.some((group) => isCensored(rule, group)))
    return how === "combined" ? combinedFit(rule, groups, options) : mixedFit(rule, groups, options);
  throw refuseTogether(how);
}

function isCensored(rule: Rule, group: ObservedGroup): boolean {
  return rule.states.some((state) => group.censoring?.[state]?.some((mark) => mark !== 0));
}
