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
 * Root of the weight of a row's value: one over a standard deviation that is known, else the root of the record's own weight, or the number of technical replicates that were
 * averaged, whose mean scatters less by the root of their number.
 */
export function rootWeight(
  group: ObservedGroup,
  state: string,
  entry: number,
  sd: number | undefined,
): number {
  const known = sd === undefined ? 1 : 1 / sd;
  const weight = group.weights?.[entry] ?? group.replicates?.[state]?.count[entry] ?? 1;
  return known * Math.sqrt(weight);
}
