import type { Observations, ObservedGroup } from "../../src/record/index.js";
import { type ColumnTable, packed } from "../../src/record/index.js";

/**
 * Observations as one table, one row per observation: series, row of the record, step, period, states, inputs, and if
 * present weights, censoring (-1 below, 1 above) and replicates.
 */
export function observationsTable(observations: Observations): ColumnTable {
  const { groups, states, inputs, axis } = observations;
  const columns: [string, (group: ObservedGroup, i: number) => unknown][] = [];
  if (groups.length > 1) columns.push(["series", (group) => group.name]);
  columns.push(["row", (group, i) => group.rows[i]], ["step", (group, i) => group.index[i]]);
  const dated = groups.some(({ labels }) => labels !== undefined);
  columns.push([axis.column, (group, i) => (dated ? group.labels?.[i] : group.time[i])]);
  for (const { name } of states) columns.push([name, (group, i) => group.values[name]![i]]);
  for (const name of inputs) columns.push([name, (group, i) => group.inputs[name]![i]]);
  if (groups.some(({ weights }) => weights)) columns.push(["weight", (group, i) => group.weights?.[i]]);
  for (const { name } of states) {
    if (groups.some(({ censoring }) => censoring?.[name]))
      columns.push([`${name} censored`, (group, i) => group.censoring?.[name]?.[i] ?? 0]);
    if (groups.some(({ replicates }) => replicates?.[name])) {
      columns.push([`${name} replicates`, (group, i) => group.replicates?.[name]?.count[i]]);
      columns.push([`${name} deviation`, (group, i) => group.replicates?.[name]?.deviation[i]]);
    }
  }
  return {
    names: columns.map(([name]) => name),
    columns: columns.map(([, of]) =>
      packed(groups.flatMap((group) => Array.from(group.index, (_, i) => of(group, i)))),
    ),
  };
}
