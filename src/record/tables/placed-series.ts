import type { ColumnTable } from "../column-table.js";
import { rowCount } from "../column-table.js";
import { decided } from "../decisions/correct.js";
import { findingLog } from "../finding-log.js";
import type { StepLength } from "../observations.js";
import type { CalendarName } from "../period/calendar.js";
import { type PeriodAxis, periodAxis } from "../period/period-axis.js";
import { wholeSteps } from "../period/whole-steps.js";
import { noDataRows } from "../refusals.js";
import { groupRows } from "../series/group-rows.js";
import { inOrder } from "../series/in-order.js";
import { duplicatePeriod } from "../series/refusals.js";

/** Where the rows of a table stand: its period column, the length of a step, and what tells series apart. */
export interface PeriodsOf {
  readonly period: string | readonly [string, string];
  readonly step?: StepLength | CalendarName;
  readonly by?: string | readonly string[];
}

/** One series: its rows (0-based) by increasing period, and the whole steps from the first of them. */
export interface PlacedSeries {
  readonly rows: Int32Array;
  readonly index: Int32Array;
}

/** A table whose rows are known by their periods. */
export interface PlacedTable {
  /** With the analyst's corrections put in. */
  readonly table: ColumnTable;
  readonly axis: PeriodAxis;
  readonly by: readonly string[];
  readonly series: readonly PlacedSeries[];
}

/**
 * Finds the place of every row: a window or a shift counts periods, not rows, so that a gap stays a gap.
 *
 * @throws {ModelError} as `observations`: periods out of order, doubled, off the step, or empty are refused.
 */
export function placed(record: ColumnTable, { period, step, by = [] }: PeriodsOf): PlacedTable {
  if (rowCount(record) === 0) throw noDataRows();
  const table = decided(record);
  const names = typeof by === "string" ? [by] : by;
  const axis = periodAxis(table, period, step);
  const log = findingLog();
  const all = Int32Array.from({ length: rowCount(table) }, (_, row) => row);
  const series = groupRows(table, names, all, log).map((group): PlacedSeries => {
    const rows = inOrder(group, axis, "refuse", log);
    const index = wholeSteps(rows, axis, "refuse", log);
    const twice = index.findIndex((step, i) => i > 0 && step === index[i - 1]);
    if (twice > 0) throw doubled(group.name, axis, rows, twice);
    return { rows, index };
  });
  return { table, axis, by: names, series };
}

function doubled(group: string, axis: PeriodAxis, rows: Int32Array, at: number): Error {
  const [first, second] = [rows[at - 1]!, rows[at]!];
  const facts = {
    rows: [first + 1, second + 1],
    column: axis.column,
    group,
    period: axis.written(second),
    values: ["", ""],
  };
  return duplicatePeriod(facts, 0);
}
