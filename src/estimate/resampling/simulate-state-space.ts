import type { RandomStream } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { GroupFit } from "../result/group-fit.js";
import { inputsByPeriod } from "../rows/inputs-by-period.js";
import { rootWeight, valueTable } from "../rows/value-table.js";
import { longestLag, slotsOf } from "../unknowns/slots.js";

/** Periods run before a record that begins in the long run. */
const settling = 200;

/**
 * Makes records [rows of the group, states] of a state-space fit: the state moved with process errors from the first
 * reading (or, after a stationary start, from the long run), and read with observation errors.
 */
export function stateSpaceMaker(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  fitted: GroupFit,
): (stream: RandomStream) => Float64Array {
  const { step } = compileRule(rule);
  const { processError, observationError, start } = fitted.filter!;
  const inputs = inputsByPeriod(rule, group);
  const parameters = Float64Array.from(rule.parameters, (name) => fitted.parameters[name]!);
  const recorded = valueTable(rule, group);
  const states = rule.states.length;
  const first = longestLag(rule);
  const begun = Float64Array.from(slotsOf(rule), ({ state, lag }) => {
    const entry = Math.max(0, group.index.indexOf(first - lag));
    return recorded[entry * states + rule.states.indexOf(state)]!;
  });
  const log = onLogScale(options);
  const disturbed = (value: number, error: number): number => (log ? value * Math.exp(error) : value + error);
  const move = (state: Float64Array, period: number, stream: RandomStream): void => {
    step(state, parameters, inputs, period, state);
    for (let s = 0; s < states; s++)
      state[s] = disturbed(state[s]!, processError[rule.states[s]!]! * stream.normal());
  };
  return (stream) => {
    const made = recorded.slice();
    const state = begun.slice();
    if (start === "stationary") for (let k = 0; k < settling; k++) move(state, 0, stream);
    let period = first;
    group.index.forEach((index, entry) => {
      for (; period < index; period++) move(state, period, stream);
      if (index < first) return;
      for (let s = 0; s < states; s++) {
        const name = rule.states[s]!;
        const sd = observationError[name]! / rootWeight(group, name, entry, undefined);
        made[entry * states + s] = disturbed(state[s]!, sd * stream.normal());
      }
    });
    return made;
  };
}
