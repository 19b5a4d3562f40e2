import { type ColumnTable, columnNamed } from "../column-table.js";
import type { FindingLog } from "../finding-log.js";
import type { ObservationOptions } from "../observation-options.js";
import type { ObservedGroup, ReplicateVariation } from "../observations.js";
import { axisOfRows } from "../period/axis-of-rows.js";
import type { PlacedRows } from "../period/placed-rows.js";
import { wholeSteps } from "../period/whole-steps.js";
import type { ReadColumn, ReadColumns } from "../read-columns.js";
import type { RowGroup } from "./group-rows.js";
import { inOrder } from "./in-order.js";
import { type MergedRows, mergePeriods } from "./merge-periods.js";
import { pick } from "./pick.js";
import { splitRows } from "./split-rows.js";

/** One series of the record, and how many rows its values and inputs come from; no group where it has no value. */
export function observedGroup(
  rowGroup: RowGroup,
  columns: ReadColumns,
  periods: PlacedRows,
  table: ColumnTable,
  options: ObservationOptions,
  log: FindingLog,
): { readonly group: ObservedGroup | undefined; readonly used: number } {
  const { name } = rowGroup;
  const ordered = inOrder(rowGroup, periods, options.disorder ?? "refuse", log);
  const areReplicates = options.replicates !== undefined;
  if (areReplicates) columnNamed(table, options.replicates, "the replicates");
  const merged = mergePeriods(ordered, name, columns, periods, areReplicates, log);
  const split = splitRows(merged, columns, periods, log);
  const { present, inputsOnly } = split;
  if (present.length === 0) return { group: undefined, used: 0 };
  const rows = picked(merged.rows, present);
  const stepsTo = (own: Int32Array): Int32Array =>
    wholeSteps(own, rows[0]!, periods, options.offStep ?? "refuse", log);
  // Columns that lose no row are used as they are: a record may have millions of rows.
  const at = (values: Float64Array, places: Int32Array): Float64Array =>
    places.length === values.length ? values : pick(values, places);
  const inputsAt = (places: Int32Array): Named<Float64Array> =>
    byName(columns.inputs, (i) => at(split.inputs[i]!, places));
  const index = stepsTo(rows);
  const { variation } = merged;
  const group: ObservedGroup = {
    name,
    axis: axisOfRows(periods, { rows, index }),
    index,
    time: pick(periods.time, rows),
    values: byName(columns.states, (i) => at(split.states[i]!, present)),
    inputs: inputsAt(present),
    ...(inputsOnly.length > 0 && {
      withoutValue: {
        index: stepsTo(picked(merged.rows, inputsOnly)),
        inputs: inputsAt(inputsOnly),
        rows: picked(merged.rows, inputsOnly).map((row) => row + 1),
      },
    }),
    rows: rows.map((row) => row + 1),
    ...(periods.moments && { labels: Array.from(rows, periods.written) }),
    ...(columns.weights && {
      weights: pick(merged.carry(columns.weights, columns.states[0]!.doubled), present),
    }),
    ...censoringOf(columns, merged, present),
    ...(variation && {
      replicates: byName(columns.states, (i) => variationAt(variation(columns.states[i]!.values), present)),
    }),
  };
  return { group, used: heldBy(merged, present) + heldBy(merged, inputsOnly) };
}

type Named<T> = Readonly<Record<string, T>>;

function byName<T>(columns: readonly ReadColumn[], of: (place: number) => T): Named<T> {
  return Object.fromEntries(columns.map(({ name }, i) => [name, of(i)]));
}

function picked(rows: Int32Array, places: Int32Array): Int32Array {
  const own = new Int32Array(places.length);
  for (let i = 0; i < places.length; i++) own[i] = rows[places[i]!]!;
  return own;
}

function heldBy({ held }: MergedRows, places: Int32Array): number {
  let sum = 0;
  for (let i = 0; i < places.length; i++) sum += held[places[i]!]!;
  return sum;
}

function variationAt({ count, deviation }: ReplicateVariation, places: Int32Array): ReplicateVariation {
  return { count: picked(count, places), deviation: pick(deviation, places) };
}

function censoringOf(
  { states }: ReadColumns,
  merged: MergedRows,
  present: Int32Array,
): { readonly censoring?: Named<Int8Array> } {
  const sides = states.flatMap((state) => {
    const { name, censoring } = state;
    if (!censoring?.some((value) => value !== 0)) return [];
    const side = merged.carrySide(censoring, state);
    return [[name, Int8Array.from(present, (i) => side[i]!)] as const];
  });
  return sides.length === 0 ? {} : { censoring: Object.fromEntries(sides) };
}
