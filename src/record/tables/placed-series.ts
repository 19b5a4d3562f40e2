import type { ColumnTable } from "../column-table.js";
import { rowCount } from "../column-table.js";
import { decided } from "../decisions/correct.js";
import { findingLog } from "../finding-log.js";
import type { StepLength } from "../observations.js";
import type { CalendarName } from "../period/calendar.js";
import { type PlacedRows, placedRows } from "../period/placed-rows.js";
import { wholeSteps } from "../period/whole-steps.js";
import { noDataRows } from "../refusals.js";
import { groupRows } from "../series/group-rows.js";
import { inOrder } from "../series/in-order.js";
import { duplicatePeriod } from "../series/refusals.js";

/** Where the rows of a table stand: its period column, the length of a step, and what tells series apart. */
export interface PeriodsOf {
  /** The period column; or a year column and one that numbers periods within it: `["year", "week"]`. */
  readonly period: string | readonly [string, string];
  /** Length of one step, or a calendar; required, because none is assumed. */
  readonly step?: StepLength | CalendarName;
  /** Columns that tell series apart: flasks, loans, items. */
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
  readonly periods: PlacedRows;
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
  const periods = placedRows(table, period, step);
  const log = findingLog();
  const all = Int32Array.from({ length: rowCount(table) }, (_, row) => row);
  const series = groupRows(table, names, all, log).map((group): PlacedSeries => {
    const rows = inOrder(group, periods, "refuse", log);
    const index = wholeSteps(rows, rows[0]!, periods, "refuse", log);
    const twice = index.findIndex((step, i) => i > 0 && step === index[i - 1]);
    if (twice > 0) throw doubled(group.name, periods, rows, twice);
    return { rows, index };
  });
  return { table, periods, by: names, series };
}

function doubled(group: string, periods: PlacedRows, rows: Int32Array, at: number): Error {
  const [first, second] = [rows[at - 1]!, rows[at]!];
  const facts = {
    rows: [first + 1, second + 1],
    column: periods.column,
    group,
    period: periods.written(second),
    values: ["", ""],
  };
  return duplicatePeriod(facts, 0);
}
