import { type Beginning, type Fit, type GroupFit, problemOf } from "../estimate/index.js";
import type { ObservedGroup } from "../record/index.js";
import { compileRule, type Rule } from "../rule/index.js";
import type { Ground } from "./central-path.js";
import type { InputPlans } from "./inputs/input-plan.js";
import { plannedInputs } from "./inputs/planned-inputs.js";
import { refuseGap } from "./refusals.js";

/** A ground, and where the fit's unknowns stand in it. */
export interface FitGround extends Ground {
  readonly group: GroupFit;
  readonly recorded: ObservedGroup;
  /** Step index of the last recorded value. */
  readonly recordEnd: number;
  /** By unknown of the fit: slot among parameters, then state vector; -1 where the path does not begin with it. */
  readonly places: Int32Array;
  /** Where a filter leaves the present state uncertain. */
  readonly belief?: NonNullable<Beginning["belief"]>;
}

/**
 * Where the future of a fitted group begins: a trajectory at its own start, a chain of steps at the last recorded value.
 *
 * @param periods - beyond the last recorded one.
 */
export function fitGround(fit: Fit, group: GroupFit, periods: number, plans: InputPlans): FitGround {
  const { rule } = fit;
  const { recorded, beginning } = problemOf(fit).group(group.group);
  const recordEnd = recorded.index[recorded.index.length - 1]!;
  const { period: from, initial, places, belief } = beginning;
  const slots = [...rule.states.map((state) => ({ state, lag: 0 })), ...rule.memory];
  slots.forEach(({ state, lag }, s) => {
    if (!Number.isFinite(initial[s]!)) throw refuseGap(state, from - lag);
  });
  return {
    rule,
    compiled: compileRule(rule),
    parameters: Float64Array.from(rule.parameters, (name) => group.parameters[name]!),
    initial,
    inputs: fittedInputs(rule, recorded, recordEnd, periods, plans),
    from,
    periods: recordEnd + periods - from,
    group,
    recorded,
    recordEnd,
    places,
    ...(belief && { belief }),
  };
}

function fittedInputs(
  rule: Rule,
  recorded: ObservedGroup,
  recordEnd: number,
  periods: number,
  plans: InputPlans,
): readonly Float64Array[] {
  return plannedInputs(rule, plans, {
    recorded: (input) => {
      const column = new Float64Array(recordEnd + 1).fill(Number.NaN);
      recorded.index.forEach((period, row) => {
        column[period] = recorded.inputs[input]?.[row] ?? Number.NaN;
      });
      return column;
    },
    rows: recordEnd + 1,
    last: recordEnd + periods,
    firstNumber: 1,
  });
}
