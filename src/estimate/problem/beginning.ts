import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { GroupFit } from "../result/group-fit.js";
import { longestLag, slotsOf } from "../unknowns/slots.js";
import { unknownsOf } from "../unknowns/unknowns.js";
import type { Scale } from "./scale.js";

/** Where the trajectory that leads into the future begins. */
export interface Beginning {
  /** Its period: that of the fitted start, or the one that the future starts after. */
  readonly period: number;
  /** Whether it begins at a fitted or given start and runs through the record. */
  readonly fromStart: boolean;
  /** [slots of the rule's state vector]; NaN where the record does not hold a value that the rule reads. */
  readonly initial: Float64Array;
  /** By unknown of the fit: its place among parameters, then state vector; -1 where the trajectory does not begin with it. */
  readonly places: Int32Array;
  /** Where a filter leaves the state uncertain: its mean and covariance, on the fitting scale. */
  readonly filtered?: {
    readonly mean: Float64Array;
    readonly covariance: Float64Array;
    readonly scale: Scale;
  };
}

/**
 * A trajectory fit goes on from its own start, a chain of steps from the last recorded value, a filter from what it holds.
 *
 * @param after - the period that the future starts after.
 */
export function beginningOf(
  rule: Rule,
  recorded: ObservedGroup,
  fitted: GroupFit,
  options: FitOptions,
  scale: Scale,
  after: number,
): Beginning {
  const fromStart = options.errors === "observation";
  const reach = longestLag(rule);
  const slots = slotsOf(rule);
  const last = fitted.filter?.last;
  const filtered = last && {
    mean: Float64Array.from(last.mean),
    covariance: Float64Array.from(last.covariance),
    scale,
  };
  const given = unknownsOf(rule, options).initial;
  const initial = Float64Array.from(slots, ({ state, lag, name }, s) => {
    if (filtered !== undefined) return scale.from(filtered.mean[s]!);
    if (fromStart) return fitted.estimates.find((each) => each.name === name)?.value ?? given[s]!;
    return recorded.values[state]![recorded.index.indexOf(after - lag)] ?? Number.NaN;
  });
  const places = Int32Array.from(fitted.estimates, ({ name, role }) => {
    if (role === "parameter") return rule.parameters.indexOf(name);
    const slot = slots.findIndex((each) => each.name === name);
    return slot < 0 || !fromStart ? -1 : rule.parameters.length + slot;
  });
  const period = fromStart ? reach : after;
  return { period, fromStart, initial, places, ...(filtered && { filtered }) };
}
