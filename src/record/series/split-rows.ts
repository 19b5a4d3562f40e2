import type { FindingLog } from "../finding-log.js";
import type { PlacedRows } from "../period/placed-rows.js";
import type { ReadColumns } from "../read-columns.js";
import type { MergedRows } from "./merge-periods.js";

/** Columns with one cell a period, and which of the periods have a value and which only inputs. */
export interface SplitRows {
  readonly states: readonly Float64Array[];
  readonly inputs: readonly Float64Array[];
  /** Places among the merged rows. */
  readonly present: Int32Array;
  readonly inputsOnly: Int32Array;
}

/**
 * Tells periods with a value from those without: missing is not zero, and a missing value takes no input with it.
 * Periods before the first value are left out, because nothing starts from them.
 */
export function splitRows(
  merged: MergedRows,
  columns: ReadColumns,
  periods: PlacedRows,
  log: FindingLog,
): SplitRows {
  const states = columns.states.map(({ values, doubled }) => merged.carry(values, doubled));
  const inputs = columns.inputs.map(({ values, doubled }) => merged.carry(values, doubled));
  const places = counting(merged.rows.length);
  const isEmpty = (i: number): boolean => states.some((values) => Number.isNaN(values[i]!));
  const empty = emptyPlaces(states);
  const first = places.find((i) => !isEmpty(i)) ?? places.length;
  const hasInputs = (i: number): boolean => i > first && inputs.some((values) => !Number.isNaN(values[i]!));
  for (const i of empty) {
    const state = states.findIndex((values) => Number.isNaN(values[i]!));
    noteMissing(merged.rows[i]!, columns.states[state]!.column, hasInputs(i), periods, log);
  }
  const present = empty.length === 0 ? places : places.filter((i) => !isEmpty(i));
  return { states, inputs, present, inputsOnly: empty.filter(hasInputs) };
}

/** 0, 1, 2 and so on. */
export function counting(length: number): Int32Array {
  const places = new Int32Array(length);
  for (let i = 0; i < length; i++) places[i] = i;
  return places;
}

/** Places at which any column is empty. A plain loop: a record may have millions of rows. */
function emptyPlaces(columns: readonly Float64Array[]): Int32Array {
  const empty = new Set<number>();
  for (const values of columns)
    for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) empty.add(i);
  return Int32Array.from(empty).sort();
}

function noteMissing(
  row: number,
  column: string,
  keepsInputs: boolean,
  periods: PlacedRows,
  log: FindingLog,
): void {
  log.note({
    kind: "missing-value",
    row: row + 1,
    column,
    value: "",
    message: `Row ${row + 1}, ${column}: empty at ${periods.column} ${periods.written(row)}. A missing value is not zero.`,
    done: keepsInputs ? "value left out; inputs kept" : "left out",
  });
}
