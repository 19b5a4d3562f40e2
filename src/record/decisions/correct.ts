import { type ColumnTable, columnNamed, rowCount, withPlainNames } from "../column-table.js";
import type { Decision } from "./decision.js";
import { noDecision, noSuchRow, reasonMissing } from "./refusals.js";

/** A correction to make; the record itself stays as it was read. */
export interface Correction {
  /** Row of the record, 1 for the first below the header. */
  readonly row: number;
  /** Column of the cell; without it the whole row is left out. */
  readonly column?: string;
  /** Value to use instead; null, or nothing, where the cell counts as missing. */
  readonly now?: unknown;
  /** Why; a correction without a reason is refused. */
  readonly why: string;
  /** Who decided. */
  readonly who?: string;
}

/**
 * Adds a correction to a record. The cells stay as they were read; what is used instead stands in `decisions`.
 *
 * @throws {ModelError} `no-such-row` | `missing-column` | `reason-missing`.
 * @example
 * const loan = tableOf({ month: [1, 2], paid: [412, 447] });
 * correct(loan, { row: 2, column: "paid", now: 412, why: "35.00 of it was a fee" }).decisions.length // 1
 */
export function correct(table: ColumnTable, correction: Correction): ColumnTable {
  const { row, column = "", now = null, why, who = "" } = correction;
  if (!Number.isInteger(row) || row < 1 || row > rowCount(table)) throw noSuchRow(row, rowCount(table));
  if (typeof why !== "string" || why.trim() === "") throw reasonMissing(row, column);
  const cells = column === "" ? undefined : columnNamed(decided(table), column, "the column to correct");
  const decision: Decision = { row, column, was: cells?.[row - 1] ?? null, now, why, who };
  return { ...table, decisions: [...(table.decisions ?? []), decision] };
}

/**
 * Takes back the last correction, or the last one of a row. With none left the record is as it was read.
 *
 * @throws {ModelError} `no-decision` when there is nothing to take back.
 */
export function undo(table: ColumnTable, row?: number): ColumnTable {
  const { decisions = [], ...rest } = table;
  const at = decisions.map((decision) => row === undefined || decision.row === row).lastIndexOf(true);
  if (at < 0) throw noDecision(row);
  const left = decisions.filter((_, i) => i !== at);
  return left.length === 0 ? rest : { ...rest, decisions: left };
}

/** The columns as they are used: with plain names, and with every correction of a cell put in. */
export function decided(record: ColumnTable): ColumnTable {
  const table = withPlainNames(record);
  const changes = (table.decisions ?? []).filter(({ column }) => column !== "");
  if (changes.length === 0) return table;
  const columns = [...table.columns];
  for (const name of new Set(changes.map(({ column }) => column))) {
    const at = table.names.indexOf(name);
    const cells: unknown[] = Array.from<unknown>(table.columns[at]!);
    for (const { row, column, now } of changes) if (column === name) cells[row - 1] = now;
    columns[at] = cells;
  }
  return { ...table, columns };
}

/** 0-based rows that the analyst chose to leave out. */
export function rowsLeftOut({ decisions = [] }: ColumnTable): ReadonlySet<number> {
  return new Set(decisions.filter(({ column }) => column === "").map(({ row }) => row - 1));
}
