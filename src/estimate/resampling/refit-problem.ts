import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { Fit } from "../fit.js";
import { bySquares, type FitOptions } from "../options/fit-options.js";
import { refuseResampling } from "../refusals.js";
import type { GroupFit } from "../result/group-fit.js";
import { type Prepared, prepared } from "../systems/prepared.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";

/** A group's least-squares fit, made ready to be done again on other values. */
export interface RefitProblem extends Prepared {
  readonly rule: Rule;
  readonly group: ObservedGroup;
  readonly options: FitOptions;
  readonly unknowns: Unknowns;
  readonly at: Float64Array;
}

/** Takes up a group of a fit again; only fits by least squares, each group on its own, can be resampled. */
export function refitProblem(fit: Fit, fitted: GroupFit): RefitProblem {
  const { rule, options } = fit;
  const unknowns = unknownsOf(rule, options);
  const own = (options.groups ?? "separate") === "separate";
  if (
    !own ||
    unknowns.names.length !== fitted.estimates.length ||
    !bySquares(options) ||
    options.robust === true
  )
    throw refuseResampling();
  const group = fit.observations.groups.find((each) => each.name === fitted.group)!;
  const at = Float64Array.from(fitted.estimates, ({ value }) => value);
  return { rule, group, options, unknowns, at, ...prepared(rule, group, unknowns, options) };
}
