import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitRows } from "../rows/fit-rows.js";
import { valueTable } from "../rows/value-table.js";

/** The value that takes the place of compared value i, given what the rule says of it. */
export type Disturbance = (fitted: number, i: number) => number;

/** Writes a record as the fitted rule could have given it: values [rows of the group, states], own unit. */
export type RecordMaker = (at: Float64Array, disturbed: Disturbance) => Float64Array;

/**
 * Makes records that a fit could have come from. With errors in the observation they are put on the fitted trajectory;
 * with errors in the process every step starts from the value made before it, so that an error carries on. Leaves the rows
 * with other values.
 */
export function recordMaker(rule: Rule, group: ObservedGroup, rows: FitRows): RecordMaker {
  const table = valueTable(rule, group);
  const states = rule.states.length;
  return (at, disturbed) => {
    const made = table.slice();
    rows.take(table);
    rows.prepare(at, false);
    for (let i = 0; i < rows.count; i++) {
      rows.residualAt(i);
      const value = disturbed(rows.fitted(), i);
      made[rows.entries[i]! * states + rows.states[i]!] = value;
      rows.put?.(i, value);
    }
    return made;
  };
}
