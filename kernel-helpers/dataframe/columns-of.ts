import type { DataFrame } from "danfojs-node";
import { type Column, type ColumnTable, isColumnTable, tableOf } from "../../src/record/index.js";
import { isFrame } from "./danfo.js";
import { notesOf } from "./frame-notes.js";
import { notARecord } from "./refusals.js";

/** Anything a record can be given as: a frame, rows as objects, columns by name, or a table of columns. */
export type RecordLike =
  | DataFrame
  | ColumnTable
  | readonly Readonly<Record<string, unknown>>[]
  | Readonly<Record<string, ArrayLike<unknown>>>;

/**
 * The columns of a record, whatever it was given as.
 *
 * A row that lacks a key has a missing value there, and the order of keys within a row does not matter.
 *
 * @throws {ModelError} `not-a-record` | `uneven-columns`.
 */
export function columnsOf(record: RecordLike): ColumnTable {
  if (isFrame(record)) return columnsOfFrame(record);
  if (Array.isArray(record)) return columnsOfRows(record);
  if (typeof record !== "object" || record === null) throw notARecord(record);
  if (isColumnTable(record)) return record;
  const entries = Object.entries(record as Record<string, unknown>);
  const bad = entries.find(([, column]) => !Array.isArray(column) && !ArrayBuffer.isView(column));
  if (bad !== undefined || entries.length === 0) throw notARecord(record, bad?.[0]);
  return tableOf(record as Record<string, ArrayLike<unknown>>);
}

function columnsOfFrame(frame: DataFrame): ColumnTable {
  // The getter builds nothing, but is asked once: `column()` copies every row each time.
  const rows = frame.values as readonly (readonly unknown[])[];
  const { names, decisions } = notesOf(frame);
  const columns = frame.columns.map((_, at) => numbersOr(rows.map((row) => row[at])));
  return { names: names ?? [...frame.columns], columns, ...(decisions && { decisions }) };
}

function columnsOfRows(rows: readonly unknown[]): ColumnTable {
  const names = new Map<string, unknown[]>();
  rows.forEach((row, i) => {
    if (typeof row !== "object" || row === null || Array.isArray(row)) throw notARecord(rows, `row ${i + 1}`);
    for (const name of Object.keys(row)) if (!names.has(name)) names.set(name, []);
  });
  for (const [name, column] of names) {
    for (const row of rows)
      column.push(Object.hasOwn(row as object, name) ? (row as Record<string, unknown>)[name] : null);
  }
  return { names: [...names.keys()], columns: [...names.values()].map(numbersOr) };
}

/** A column of numbers and empty cells becomes numbers with NaN where a cell is empty; others stay as they are. */
function numbersOr(cells: readonly unknown[]): Column {
  const values = new Float64Array(cells.length);
  for (let i = 0; i < cells.length; i++) {
    const cell = cells[i];
    if (typeof cell === "number") values[i] = cell;
    else if (cell === null || cell === undefined) values[i] = Number.NaN;
    else return cells;
  }
  return values;
}
