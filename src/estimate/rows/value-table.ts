import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";

/** The group's values of the rule's states, [rows, states]; NaN where one is missing. */
export function valueTable(rule: Rule, group: ObservedGroup): Float64Array {
  const states = rule.states.length;
  const table = new Float64Array(group.index.length * states);
  rule.states.forEach((state, s) => {
    const column = group.values[state]!;
    for (let i = 0; i < column.length; i++) table[i * states + s] = column[i]!;
  });
  return table;
}

/**
 * Root of the weight of a row's value: that of the record's own weight, or of the number of technical replicates that were
 * averaged, whose mean scatters less by the root of their number; over the standard deviation where one is known.
 *
 * @param sd - a number, or the column that holds one for every row.
 */
export function rootWeight(
  group: ObservedGroup,
  state: string,
  entry: number,
  sd: number | string | undefined,
): number {
  const known = typeof sd === "string" ? group.inputs[sd]![entry]! : (sd ?? 1);
  const weight = group.weights?.[entry] ?? group.replicates?.[state]?.count[entry] ?? 1;
  return Math.sqrt(weight) / known;
}
