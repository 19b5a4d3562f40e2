import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";
import type { DuckDBConnection, DuckDBDataChunk } from "@duckdb/node-api";
import { nearestNames } from "../numeric/index.js";
import { type ColumnTable, packed } from "../record/index.js";
import { sqlIdentifier, sqlString } from "./database.js";
import { detectDelimiter } from "./detect-delimiter.js";
import { columnNotFoundError, notStreamableError } from "./errors.js";
import { formatOfExtension } from "./file-extension.js";
import { plainCsvRelation } from "./plain-csv.js";
import type { ReadOptions } from "./read-options.js";
import { type Relation, relationOf } from "./relation.js";
import { formatOfSignature } from "./signature.js";
import { textHead } from "./text-head.js";

/** One series of a file: its name, its columns, and its rows in the file. */
export interface StoredSeries {
  /** Values of the columns in `by`, joined by ", ". */
  readonly name: string;
  readonly table: ColumnTable;
  /** 1-based rows of the file, header not counted. */
  readonly rows: Int32Array;
}

/** How to stream a file by series. */
export interface StreamOptions extends ReadOptions {
  /** Columns that identify a series. */
  readonly by: string | readonly string[];
  /** Memory that the database engine may use before it sorts on disk. Default "256MB". */
  readonly memory?: string;
}

/**
 * Streams a file series by series, whatever their order in it, with one series in memory at a time. Rows of a series
 * keep the order of the file.
 *
 * @throws {ModelError} `not-streamable` for a workbook, JSON, or a text file that has to be read cell by
 *   cell (write it as Parquet first); `no-such-column`.
 */
export async function* streamSeries(path: string, options: StreamOptions): AsyncGenerator<StoredSeries> {
  const { DuckDBInstance } = await import("@duckdb/node-api");
  const folder = await mkdtemp(join(tmpdir(), "periodwise-sort-"));
  const instance = await DuckDBInstance.create(":memory:", {
    memory_limit: options.memory ?? "256MB",
    temp_directory: folder,
    preserve_insertion_order: "true",
  });
  const connection = await instance.connect();
  try {
    const relation = await relationOfFile(connection, path, options);
    yield* seriesOf(connection, relation, typeof options.by === "string" ? [options.by] : options.by);
  } finally {
    connection.closeSync();
    instance.closeSync();
    await rm(folder, { recursive: true, force: true });
  }
}

async function relationOfFile(
  connection: DuckDBConnection,
  path: string,
  options: StreamOptions,
): Promise<Relation> {
  const full = resolve(path);
  const format = (await formatOfSignature(full)) ?? options.format ?? formatOfExtension(path);
  if (format === "parquet") return relationOf(connection, `read_parquet(${sqlString(full)})`);
  if (format === "duckdb") {
    await connection.run(`ATTACH ${sqlString(full)} AS streamed (READ_ONLY)`);
    return relationOf(connection, `streamed.main.${sqlIdentifier(options.table ?? "record")}`);
  }
  const head = format === "csv" || format === "tsv" ? await textHead(full) : undefined;
  const delimiter =
    options.delimiter ?? (format === "tsv" ? "\t" : head === undefined ? "," : detectDelimiter(head, path));
  const relation = head === undefined ? undefined : plainCsvRelation(full, head, delimiter, options);
  if (relation === undefined) throw notStreamableError(path);
  return relation;
}

async function* seriesOf(
  connection: DuckDBConnection,
  { from, names, kinds, selected }: Relation,
  by: readonly string[],
): AsyncGenerator<StoredSeries> {
  const keys = by.map((name) => {
    const at = names.indexOf(name);
    if (at < 0) throw columnNotFoundError(name, names, nearestNames(name, names));
    return at;
  });
  const columns = selected.map((sql, i) => `${sql} AS s${i}`).join(", ");
  const order = [...keys.map((at) => `s${at}`), "place"].join(", ");
  const query = `SELECT * FROM (SELECT ${columns}, (row_number() OVER ())::INTEGER AS place FROM ${from}) ORDER BY ${order}`;
  const result = await connection.stream(query);
  let current = emptySeries(kinds.length);
  for (;;) {
    const chunk = await result.fetchChunk();
    if (chunk === null || chunk.rowCount === 0) break;
    for (const [start, end] of runs(chunk, keys)) {
      const key = keyAt(chunk, keys, start);
      if (current.rows.length > 0 && key !== current.key) {
        yield storedSeries(current, names);
        current = emptySeries(kinds.length);
      }
      current.key = key;
      appendRows(chunk, start, end, current, keys);
    }
  }
  if (current.rows.length > 0) yield storedSeries(current, names);
}

interface SeriesBuilder {
  key: string;
  name: string;
  readonly columns: unknown[][];
  readonly rows: number[];
}

function emptySeries(columns: number): SeriesBuilder {
  return { key: "", name: "", columns: Array.from({ length: columns }, () => []), rows: [] };
}

function keyAt(chunk: DuckDBDataChunk, keys: readonly number[], row: number): string {
  return JSON.stringify(keys.map((at) => String(chunk.getColumnVector(at).getItem(row))));
}

/** Runs of rows of one series within a chunk, as start and end. */
function runs(chunk: DuckDBDataChunk, keys: readonly number[]): readonly (readonly [number, number])[] {
  const found: [number, number][] = [];
  const vectors = keys.map((at) => chunk.getColumnVector(at));
  const rows = chunk.rowCount;
  let start = 0;
  for (let row = 1; row <= rows; row++) {
    if (row < rows && vectors.every((vector) => vector.getItem(row) === vector.getItem(row - 1))) continue;
    found.push([start, row]);
    start = row;
  }
  return found;
}

function appendRows(
  chunk: DuckDBDataChunk,
  start: number,
  end: number,
  series: SeriesBuilder,
  keys: readonly number[],
): void {
  series.columns.forEach((column, at) => {
    const vector = chunk.getColumnVector(at);
    for (let row = start; row < end; row++) column.push(vector.getItem(row));
  });
  const positions = chunk.getColumnVector(series.columns.length);
  for (let row = start; row < end; row++) series.rows.push(Number(positions.getItem(row)));
  series.name = keys.map((at) => String(chunk.getColumnVector(at).getItem(start))).join(", ");
}

function storedSeries(series: SeriesBuilder, names: readonly string[]): StoredSeries {
  const table = { names, columns: series.columns.map(packed) };
  return { name: series.name, table, rows: Int32Array.from(series.rows) };
}
