import type { FindingLog } from "../finding-log.js";
import type { PeriodAxis } from "../period/period-axis.js";
import type { ReadColumns } from "../read-columns.js";

/** The rows in which every state has a value. The others are left out and named: missing is not zero. */
export function presentRows(
  rows: Int32Array,
  columns: ReadColumns,
  axis: PeriodAxis,
  log: FindingLog,
): Int32Array {
  const empty = (row: number): number => columns.values.findIndex((values) => Number.isNaN(values[row]!));
  let missing = 0;
  for (const row of rows) {
    const state = empty(row);
    if (state < 0) continue;
    missing++;
    noteMissing(row, columns.states[state]!.column, axis, log);
  }
  return missing === 0 ? rows : rows.filter((row) => empty(row) < 0);
}

function noteMissing(row: number, column: string, axis: PeriodAxis, log: FindingLog): void {
  log.note({
    kind: "missing-value",
    row: row + 1,
    column,
    value: "",
    message: `Row ${row + 1}, ${column}: empty at ${axis.column} ${axis.written(row)}. A missing value is not zero.`,
    done: "left out; the period stays a gap",
  });
}
