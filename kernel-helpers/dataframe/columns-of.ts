import type { DataFrame } from "danfojs-node";
import {
  type ColumnTable,
  isColumnTable,
  type Observations,
  packed,
  tableOf,
  tableOfRows,
} from "../../src/record/index.js";
import { isFrame } from "./danfo.js";
import { notARecordError } from "./errors.js";
import { frameNotes } from "./frame-notes.js";
import { observationsTable } from "./observations-table.js";

/** All forms of a record: a frame, row objects, columns by name, a table of columns, observations. */
export type RecordLike =
  | DataFrame
  | ColumnTable
  | Observations
  | readonly Readonly<Record<string, unknown>>[]
  | Readonly<Record<string, ArrayLike<unknown>>>;

/**
 * The columns of a record in any of its forms.
 *
 * A row without a key has a missing value there; the order of keys within a row does not matter.
 *
 * @throws {ModelError} `not-a-record` | `uneven-columns`.
 */
export function columnsOf(record: RecordLike): ColumnTable {
  if (isFrame(record)) return columnsOfFrame(record);
  if (Array.isArray(record)) return columnsOfRows(record);
  if (typeof record !== "object" || record === null) throw notARecordError(record);
  if (isColumnTable(record)) return record;
  if (isObserved(record)) return observationsTable(record);
  const entries = Object.entries(record as Record<string, unknown>);
  const bad = entries.find(([, column]) => !Array.isArray(column) && !ArrayBuffer.isView(column));
  if (bad !== undefined || entries.length === 0)
    throw notARecordError(
      record,
      bad === undefined ? "it has no columns" : `column "${bad[0]}" is not an array`,
    );
  return tableOf(record as Record<string, ArrayLike<unknown>>);
}

function isObserved(record: object): record is Observations {
  const { kind, groups } = record as { kind?: unknown; groups?: unknown };
  return kind === "observations" && Array.isArray(groups);
}

function columnsOfFrame(frame: DataFrame): ColumnTable {
  // Read once: `column()` would copy every row each time.
  const rows = frame.values as readonly (readonly unknown[])[];
  const { names = frame.columns, decisions, raw = names.length } = frameNotes(frame);
  const columns = names.slice(0, raw).map((_, at) => packed(rows.map((row) => row[at])));
  return { names: names.slice(0, raw), columns, ...(decisions && { decisions }) };
}

function columnsOfRows(rows: readonly unknown[]): ColumnTable {
  const bad = rows.findIndex((row) => typeof row !== "object" || row === null || Array.isArray(row));
  if (bad >= 0) throw notARecordError(rows, `row ${bad + 1} is not an object`);
  return tableOfRows(rows as readonly object[]);
}
