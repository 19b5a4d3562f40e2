import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { Fit } from "../fit.js";
import type { FitOptions } from "../options/fit-options.js";
import type { GroupFit } from "../result/group-fit.js";
import { spreadNames } from "../unknowns/spread-names.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import { type StateSpace, stateSpace } from "./state-space.js";

/** What a state-space fit of a group is searched on. */
export interface StateSpaceProblem {
  readonly rule: Rule;
  readonly options: FitOptions;
  readonly group: ObservedGroup;
  readonly unknowns: Unknowns;
  readonly at: Float64Array;
  readonly space: StateSpace;
}

/** A state-space fit of one group, taken up again. */
export function stateSpaceProblem(fit: Fit, fitted: GroupFit): StateSpaceProblem {
  const { rule, options } = fit;
  const group = fit.observations.groups.find((each) => each.name === fitted.group)!;
  const unknowns = unknownsOf(rule, options, spreadNames(rule, options));
  const { start, method } = fitted.filter!;
  const at = Float64Array.from(fitted.estimates, ({ value }, i) =>
    unknowns.rooted[i] ? value * value : value,
  );
  return {
    rule,
    options,
    group,
    unknowns,
    at,
    space: stateSpace(rule, group, unknowns, options, { start, method }),
  };
}
