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
  const missing = new Map<number, number>();
  columns.values.forEach((values, state) => {
    for (const row of rows) if (Number.isNaN(values[row]!) && !missing.has(row)) missing.set(row, state);
  });
  if (missing.size === 0) return rows;
  for (const [row, state] of missing) noteMissing(row, columns.states[state]!.column, axis, log);
  return rows.filter((row) => !missing.has(row));
}

function noteMissing(row: number, column: string, axis: PeriodAxis, log: FindingLog): void {
  log.note({
    kind: "missing-value",
    row: row + 1,
    column,
    value: "",
    message: `Row ${row + 1}, ${column}: empty at ${axis.column} ${axis.written(row)}. A missing value is not zero.`,
    done: "left out",
  });
}
