import type { ObservedGroup } from "../../record/index.js";
import { compileRule, type Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";
import { inputsByPeriod } from "../rows/inputs-by-period.js";
import { recordedPairs } from "../rows/recorded-pairs.js";
import { valueTable } from "../rows/value-table.js";
import { slotsOf } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";

/** The value that takes the place of compared value i, given what the rule says of it. */
export type Disturbance = (fitted: number, i: number) => number;

/** Writes a record as the fitted rule could have given it: values [rows of the group, states], own unit. */
export type RecordMaker = (at: Float64Array, disturbed: Disturbance) => Float64Array;

/**
 * Makes records that a fit could have come from. With errors in the observation they are put on the fitted trajectory;
 * with errors in the process every step starts from the value made before it, so that an error carries on.
 */
export function recordMaker(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  rows: FitRows,
  options: FitOptions,
): RecordMaker {
  const table = valueTable(rule, group);
  const states = rule.states.length;
  if (options.errors === "process") return stepByStep(rule, group, unknowns, rows, table);
  return (at, disturbed) => {
    const made = table.slice();
    rows.prepare(at, false);
    for (let i = 0; i < rows.count; i++) {
      rows.residualAt(i);
      made[rows.entries[i]! * states + rows.states[i]!] = disturbed(rows.fitted(), i);
    }
    return made;
  };
}

function stepByStep(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  rows: FitRows,
  table: Float64Array,
): RecordMaker {
  const compiled = compileRule(rule);
  const inputs = inputsByPeriod(rule, group);
  const { from, to, spans, sources } = recordedPairs(rule, group);
  const slots = slotsOf(rule);
  const slotStates = slots.map(({ state }) => rule.states.indexOf(state));
  const states = rule.states.length;
  const cellOf = new Map(Array.from(rows.entries, (entry, i) => [entry * states + rows.states[i]!, i]));
  const start = new Float64Array(slots.length);
  const longest = spans.reduce((most, span) => Math.max(most, span), 1);
  const path = new Float64Array((longest + 1) * slots.length);
  return (at, disturbed) => {
    place(unknowns, at);
    const made = table.slice();
    for (let pair = 0; pair < to.length; pair++) {
      for (let s = 0; s < slots.length; s++)
        start[s] = made[sources[pair * slots.length + s]! * states + slotStates[s]!]!;
      compiled.path(start, unknowns.parameters, inputs, group.index[from[pair]!]!, spans[pair]!, path);
      for (let s = 0; s < states; s++) {
        const cell = to[pair]! * states + s;
        const i = cellOf.get(cell);
        if (i !== undefined) made[cell] = disturbed(path[spans[pair]! * slots.length + s]!, i);
      }
    }
    return made;
  };
}
