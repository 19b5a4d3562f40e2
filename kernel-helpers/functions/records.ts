import type { DataFrame } from "danfojs-node";
import { freezeDeep, frozenCopy } from "../../src/numeric/index.js";
import {
  type ColumnTable,
  type Decision,
  type DifferenceOptions,
  type Differences,
  differences as differencesOf,
  type Observations as EngineObservations,
  type ObservationOptions,
  observations as observe,
  tableOfRows,
} from "../../src/record/index.js";
import {
  holdsSeveralTables,
  type NamedTable,
  type ReadOptions,
  type RecordSource,
  readTable,
  type WriteOptions,
  writeTables,
} from "../../src/store/index.js";
import {
  attachNotes,
  columnsOf,
  correctionNotes,
  frameNotes,
  type RecordLike,
  type Result,
  tablesOf,
  toFrame,
  withCorrectionColumns,
} from "../dataframe/index.js";
import { checkCall } from "../options/index.js";
import type { Observations } from "../results/index.js";
import { showing } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { decisionRows, decisionSentence } from "./decisions-table.js";
import { differencesBundle } from "./show-differences.js";
import { presentObservations } from "./show-observations.js";

/**
 * Reads a record: a text file with delimiters, a workbook, Parquet, JSON, or a table of a database file.
 *
 * What a text file does not show (delimiter, decimal sign, order of dates) is asked for in the error, never
 * guessed. The file's SHA-256 is kept with the frame and noted for the case's rerun block.
 *
 * @param path - relative to the notebook's folder.
 * @returns a DataFrame that shows itself; `sourceOf(frame)` tells where it came from.
 * @throws {ModelError} `no-such-file` | `format-unknown` | `no-data-rows` | `unreadable-file` | `ragged-row` |
 *   `delimiter-unclear` | `decimal-sign-unclear` | `ambiguous-date` | `encoding-unclear` and others of its kind.
 * @example const readings = await readRecord("data/algae-line-3.csv");
 */
export async function readRecord(path: string, options: ReadOptions = {}): Promise<DataFrame> {
  checkCall("readRecord", arguments);
  const table = await readTable(path, options);
  const frame = toFrame(table);
  const found = [...table.source.found, ...correctionNotes(table.names)];
  const source = freezeDeep({ ...table.source, found });
  attachNotes(frame, { ...frameNotes(frame), source });
  noteSource(source);
  return frame;
}

/**
 * Writes a record, or the tables of any result, to a file: CSV, TSV, Excel, Parquet, JSON or a DuckDB file, by
 * the ending of its name. A workbook takes every table of a result, a sheet each.
 *
 * A corrected record is written as it is shown: the columns as they were read, beside them those of what is used
 * instead, and which rows are left out. A workbook and a database file take the decisions log as well, as a table
 * "decisions" (with `table`, "... decisions").
 *
 * Every double comes back the same; a missing cell is left empty; a text is quoted where it must be. A text that
 * begins with = is written as it is: a workbook keeps it a text, a spreadsheet program that opens a CSV may not. The
 * file is written whole or not at all.
 *
 * @throws {ModelError} `format-unknown` | `not-writable` | `not-a-record`.
 * @example await writeRecord(fit(rule, counts, { errors: "process" }), "crowding.xlsx");
 */
export async function writeRecord(
  record: RecordLike | Result,
  path: string,
  options: WriteOptions = {},
): Promise<void> {
  checkCall("writeRecord", arguments);
  const tables = tablesOf(record);
  const named = tables.length === 1 ? withDecisions(tables[0]!.table, path, options) : tables;
  await writeTables(named, path, options);
}

/** A record as it is shown, and its decisions log where the file has room for it. */
function withDecisions(
  record: ColumnTable,
  path: string,
  { format, table }: WriteOptions,
): readonly NamedTable[] {
  const { decisions = [] } = record;
  const shown = { name: table ?? "record", table: withCorrectionColumns(record) };
  if (decisions.length === 0 || !holdsSeveralTables(path, format)) return [shown];
  const name = table === undefined ? "decisions" : `${table} decisions`;
  return [shown, { name, table: tableOfRows(decisionRows(decisions)) }];
}

/**
 * Makes a record ready for rules: values by whole steps for each series, with all that was found on the way.
 *
 * @param record - a DataFrame, rows as objects, or columns by name.
 * @throws {ModelError} as the engine's `observations`; each message names row, column, value and what to do.
 * @example
 * const counts = observations(readings, { period: "hour", step: { every: 12, of: "hour" }, by: "flask", value: "density" });
 */
export function observations(record: RecordLike, options: ObservationOptions): Observations {
  checkCall("observations", arguments);
  const table = columnsOf(record);
  const made = presentObservations(observe(table, frozenCopy(options)));
  const { source } = frameNotes(record);
  if (source !== undefined) noteSource(source);
  noteObservations(made, table.decisions ?? []);
  return made;
}

/**
 * Takes the differences of a record and shows them: table, change-against-value figure, findings.
 *
 * @example differences(counts, { per: "log" });
 */
export function differences(record: EngineObservations, options: DifferenceOptions = {}): Differences {
  checkCall("differences", arguments);
  const made = differencesOf(record, frozenCopy(options));
  return showing(made, () => differencesBundle(made));
}

/** For the rerun block: the file behind a record, which may have been read before the case was opened. */
function noteSource({ path, rows, checksum }: RecordSource): void {
  caseLog.noteRecord({ path, rows, checksum });
}

/** For the rerun block: how the record was read, and each choice of the options that changed a value. */
function noteObservations(
  { states, axis, decisions = [] }: EngineObservations,
  known: readonly Decision[],
): void {
  const names = states.map(({ column }) => `"${column}"`).join(", ");
  caseLog.noteStep(
    `observations of ${names} by "${axis.column}" in steps of ${axis.calendar ?? `${axis.step.every} ${axis.step.of}`}`,
  );
  for (const decision of decisions)
    if (!known.includes(decision)) caseLog.noteStep(`decision: ${decisionSentence(decision)}`);
}
