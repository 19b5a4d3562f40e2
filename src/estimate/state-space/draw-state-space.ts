import type { RandomStream } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { scaleOf } from "../problem/scale.js";
import { inputsByPeriod } from "../rows/inputs-by-period.js";
import type { Readings } from "../rows/readings.js";
import { valueTable } from "../rows/value-table.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import type { Filtering } from "./state-space.js";

/** Periods run before a record that begins in the long run. */
const settling = 200;

/**
 * Makes records [rows of the group, states] of a state-space fit: the state moved with process errors from the first
 * reading or known state (or, after a stationary start, from the long run), and read with observation errors.
 *
 * @param readingVariance - of a reading of weight 1, by state, at the unknowns placed last.
 */
export function drawStateSpace(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  readings: Readings,
  start: Filtering["start"],
  readingVariance: (state: number) => number,
): (at: Float64Array, stream: RandomStream) => Float64Array {
  const { step } = compileRule(rule);
  const { parameters, spreads } = unknowns;
  const inputs = inputsByPeriod(rule, group);
  const recorded = valueTable(rule, group);
  const states = rule.states.length;
  const { from, to } = scaleOf(options);
  const disturbed = (value: number, error: number): number => from(to(value) + error);
  const begun = readings.beginning.map(from);
  const { first, periods, entries, states: readStates, roots, count } = readings;
  const move = (state: Float64Array, period: number, stream: RandomStream): void => {
    step(state, parameters, inputs, period, state);
    for (let s = 0; s < states; s++)
      state[s] = disturbed(state[s]!, Math.sqrt(spreads[s]!) * stream.normal());
  };
  return (at, stream) => {
    place(unknowns, at);
    const made = recorded.slice();
    const state = begun.slice();
    if (start === "stationary") for (let k = 0; k < settling; k++) move(state, 0, stream);
    let period = first;
    for (let i = 0; i < count; i++) {
      for (; period < periods[i]!; period++) move(state, period, stream);
      const s = readStates[i]!;
      const sd = Math.sqrt(readingVariance(s)) / roots[i]!;
      made[entries[i]! * states + s] = disturbed(state[s]!, sd * stream.normal());
    }
    return made;
  };
}
