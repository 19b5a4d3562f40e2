import { type Column, type ColumnTable, columnNamed, isEmpty, rowCount } from "../column-table.js";
import { rowsLeftOut } from "../decisions/correct.js";
import { noSuchRow } from "../decisions/refusals.js";
import { cellText, type PeriodText, periodText } from "../period/period-text.js";
import { conditionWrong, noRowsChosen } from "../refusals.js";
import { counting } from "./split-rows.js";

/** A cell that rows are chosen by. */
export type CellValue = string | number | boolean | Date | null;

/** Which cells of a column a row must have: one, one of several, any but some, or those of a range with both its ends. */
export type RowCondition =
  | CellValue
  | readonly CellValue[]
  | { readonly not: CellValue | readonly CellValue[] }
  | { readonly from?: string | number | Date; readonly until?: string | number | Date };

/** Rows of the record by number, 1 for the first below the header; both ends are included. */
export interface RowRange {
  /** First row; default 1. */
  readonly from?: number;
  /** Last row; default the last one of the record. */
  readonly until?: number;
  /** Rows to leave out. */
  readonly except?: number | readonly number[];
}

/** Rows (0-based) that conditions and numbers admit. */
export interface ChosenRows {
  readonly rows: Int32Array;
  /** Whether a row is neither chosen nor corrected away, and so must be readable. */
  readonly isRead: (row: number) => boolean;
  /** Rows chosen, those that a correction leaves out among them. */
  readonly count: number;
}

/**
 * Chooses the rows to read, before any cell of them is looked at: what a left-out row holds is of no concern.
 *
 * @throws {ModelError} `no-rows-chosen` | `no-such-row` | `missing-column` | `option-wrong`.
 */
export function chooseRows(
  table: ColumnTable,
  where: Readonly<Record<string, RowCondition>> = {},
  range: RowRange = {},
): ChosenRows {
  const conditions = Object.entries(where).map(([name, condition]) =>
    testOf(columnNamed(table, name, "a condition"), name, condition),
  );
  const inRange = rangeTest(range, rowCount(table));
  const all = counting(rowCount(table));
  const chosen =
    conditions.length === 0 && inRange === undefined
      ? all
      : all.filter((row) => (inRange?.(row) ?? true) && conditions.every((meets) => meets(row)));
  if (chosen.length === 0) throw noRowsChosen(where, range, (name) => cellsOf(table, name));
  const out = rowsLeftOut(table);
  const rows = out.size === 0 ? chosen : chosen.filter((row) => !out.has(row));
  if (rows.length === all.length) return { rows, isRead: () => true, count: chosen.length };
  const marks = new Uint8Array(all.length);
  for (const row of rows) marks[row] = 1;
  return { rows, isRead: (row) => marks[row] === 1, count: chosen.length };
}

function cellsOf(table: ColumnTable, name: string): readonly string[] {
  return [...new Set(Array.from<unknown>(columnNamed(table, name, "a condition")).map(cellText))];
}

function rangeTest(range: RowRange, rows: number): ((row: number) => boolean) | undefined {
  const { from = 1, until = rows, except = [] } = range;
  const out = new Set([except].flat());
  for (const row of [from, until, ...out])
    if (!Number.isInteger(row) || row < 1 || row > rows) throw noSuchRow(row, rows);
  if (from === 1 && until === rows && out.size === 0) return undefined;
  return (row) => row + 1 >= from && row + 1 <= until && !out.has(row + 1);
}

function testOf(column: Column, name: string, condition: RowCondition): (row: number) => boolean {
  if (!isOptions(condition)) return sameAs(column, condition);
  if ("not" in condition) {
    const isOne = sameAs(column, condition.not);
    return (row) => !isOne(row);
  }
  const strange = Object.keys(condition).filter((key) => key !== "from" && key !== "until");
  if (strange.length > 0 || Object.keys(condition).length === 0)
    throw conditionWrong(name, condition, "numbers or dates");
  return between(column, name, condition);
}

function isOptions(
  condition: RowCondition,
): condition is Exclude<RowCondition, CellValue | readonly CellValue[]> {
  return (
    typeof condition === "object" &&
    condition !== null &&
    !Array.isArray(condition) &&
    !(condition instanceof Date)
  );
}

function sameAs(column: Column, wanted: CellValue | readonly CellValue[]): (row: number) => boolean {
  const cells = new Set([wanted].flat().map(cellText));
  return (row) => cells.has(cellText(column[row]));
}

/** Dates are compared with the whole of what an end names: until "2026-06" takes all of June. */
function between(
  column: Column,
  name: string,
  { from, until }: { readonly from?: string | number | Date; readonly until?: string | number | Date },
): (row: number) => boolean {
  const first = column.find((cell: unknown) => !isEmpty(cell));
  if (typeof first === "number" || Number.isFinite(Number(first))) {
    const least = Number(from ?? Number.NEGATIVE_INFINITY);
    const most = Number(until ?? Number.POSITIVE_INFINITY);
    if (Number.isNaN(least) || Number.isNaN(most)) throw conditionWrong(name, { from, until }, "numbers");
    return (row) => !isEmpty(column[row]) && Number(column[row]) >= least && Number(column[row]) <= most;
  }
  const read = (end: string | number | Date): PeriodText => {
    const found = periodText(end instanceof Date ? end : String(end));
    if (found === undefined)
      throw conditionWrong(name, { from, until }, "dates such as 2026-03-31 or 2026-03");
    return found;
  };
  const start = from === undefined ? Number.NEGATIVE_INFINITY : read(from).start;
  const end = until === undefined ? Number.POSITIVE_INFINITY : read(until).end;
  return (row) => {
    const at = periodText(column[row])?.start;
    return at !== undefined && at >= start && at < end;
  };
}
