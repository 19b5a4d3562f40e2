import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { noStartError, stepFromZeroError, togetherError } from "../errors.js";
import { checkGroup, checkRecorded } from "../options/check-group.js";
import type { FitOptions } from "../options/fit-options.js";
import type { Search } from "../problem/search.js";
import { kindOf, searchOf } from "../problem/search-of.js";
import { addedCriteria } from "../result/criteria.js";
import { describeFit } from "../result/describe-fit.js";
import type { GroupFit } from "../result/group-fit.js";
import { optimum } from "../search/optimum.js";
import { stateSpaceFit } from "../state-space/state-space-fit.js";
import { unknownsOf } from "../unknowns/unknowns.js";
import { combinedFit } from "./combined-fit.js";
import type { JointFit } from "./joint-fit.js";
import { mixedFit } from "./mixed-fit.js";

/** Fits a rule to one group of a record. */
function fitGroup(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  checkGroup(rule, group, options, unknownsOf(rule, options));
  if (kindOf(rule, group, options) === "state-space") return stateSpaceFit(rule, group, options);
  return solved(rule, searchOf(rule, group, options), options);
}

function solved(rule: Rule, search: Search, options: FitOptions): GroupFit {
  const starts = search.starts();
  if (starts.length === 0) throw noStart(rule, search, options);
  const { objective, unknowns, cutAt } = search;
  const found = optimum(objective, unknowns, starts, cutAt, options.intervals !== "none");
  return describeFit(rule, search, options, found, search.measures(found.at, found.value));
}

/** Why no start was found: of counts most often a step from 0. */
function noStart(rule: Rule, { group, family }: Search, options: FitOptions): Error {
  const column = group.values[rule.states[0]!]!;
  const from = column.findIndex((value, row) => value === 0 && column[row + 1]! > 0);
  const stuck = family?.counts === true && options.errors === "process" && from >= 0;
  return stuck ? stepFromZeroError(group, group.rows[from]!, rule.text) : noStartError(group, rule.text);
}

/** Fits all groups of a record: each on its own, with the same parameters, or with parameters from a population. */
export function fitGroups(rule: Rule, groups: readonly ObservedGroup[], options: FitOptions): JointFit {
  const { groups: how = "separate" } = options;
  if (how === "separate" || (how === "combined" && groups.length === 1)) {
    const apart = groups.map((group) => fitGroup(rule, group, options));
    return { groups: apart, criteria: addedCriteria(apart.map(({ criteria }) => criteria!)) };
  }
  if (groups.some((group) => kindOf(rule, group, options) !== "least-squares")) throw togetherError(how);
  for (const group of groups) checkRecorded(rule, group, options);
  return how === "combined" ? combinedFit(rule, groups, options) : mixedFit(rule, groups, options);
}
