import { type ColumnTable, columnNamed } from "../column-table.js";
import type { FindingLog } from "../finding-log.js";
import type { ObservationOptions } from "../observation-options.js";
import type { ObservedGroup } from "../observations.js";
import type { PeriodAxis } from "../period/period-axis.js";
import { wholeSteps } from "../period/whole-steps.js";
import type { ReadColumns } from "../read-columns.js";
import type { RowGroup } from "./group-rows.js";
import { inOrder } from "./in-order.js";
import { type MergedRows, mergeDuplicates } from "./merge-duplicates.js";
import { pick } from "./pick.js";
import { presentRows } from "./present-rows.js";

/** One series of the record, and how many rows its values come from. */
export function observedGroup(
  rowGroup: RowGroup,
  columns: ReadColumns,
  axis: PeriodAxis,
  table: ColumnTable,
  options: ObservationOptions,
  log: FindingLog,
): { readonly group: ObservedGroup; readonly used: number } {
  const { name } = rowGroup;
  const ordered = inOrder(rowGroup, axis, options.disorder ?? "refuse", log);
  const present = presentRows(ordered, columns, axis, log);
  if (options.replicates !== undefined) columnNamed(table, options.replicates, "the replicates");
  const merging = options.replicates === undefined ? (options.duplicates ?? "refuse") : "replicates";
  const merged = mergeDuplicates(present, name, columns, axis, merging, log);
  const index =
    present.length === 0
      ? new Int32Array(0)
      : wholeSteps(merged.rows, axis, options.offStep ?? "refuse", log);
  const group: ObservedGroup = {
    name,
    index,
    time: pick(axis.time, merged.rows),
    values: byState(columns, (state) => merged.carry(columns.values[state]!)),
    inputs: Object.fromEntries(
      Array.from(columns.inputs, ([input, column]) => [input, merged.carry(column)]),
    ),
    rows: merged.rows.map((row) => row + 1),
    ...(axis.isDated && { labels: Array.from(merged.rows, axis.written) }),
    ...(columns.weights && { weights: merged.carry(columns.weights) }),
    ...censoringOf(columns, merged),
    ...(merged.spread && { replicates: byState(columns, (state) => merged.spread!(columns.values[state]!)) }),
  };
  return { group, used: merged.used };
}

function byState<T>(columns: ReadColumns, of: (state: number) => T): Readonly<Record<string, T>> {
  return Object.fromEntries(columns.states.map(({ name }, state) => [name, of(state)]));
}

function censoringOf(
  columns: ReadColumns,
  merged: MergedRows,
): { readonly censoring?: Readonly<Record<string, Int8Array>> } {
  const sides = columns.states.flatMap(({ name }, state) => {
    const side = columns.censoring[state];
    return side?.some((value) => value !== 0) ? [[name, merged.carrySide(side)] as const] : [];
  });
  return sides.length === 0 ? {} : { censoring: Object.fromEntries(sides) };
}
