import { readdir, stat } from "node:fs/promises";
import { basename, dirname, resolve } from "node:path";
import { nearestNames } from "../numeric/index.js";
import { formatOfEnding } from "./format-of-ending.js";
import { readCsv } from "./read-csv.js";
import { readDuckdb } from "./read-duckdb.js";
import { readExcel } from "./read-excel.js";
import { readJson } from "./read-json.js";
import type { Format, ReadOptions } from "./read-options.js";
import { readParquet } from "./read-parquet.js";
import { emptyFile, formatUnknown, noSuchFile, pathMissing, unreadableFile } from "./refusals.js";
import { type FileScan, scanFile } from "./scan-file.js";
import { signatureOf } from "./signature.js";
import type { FileColumns, StoredTable } from "./stored-table.js";

type Reader = (path: string, shownPath: string, options: ReadOptions) => Promise<FileColumns>;

const readers: Readonly<Record<Format, Reader>> = {
  csv: readCsv,
  tsv: (path, shownPath, options) => readCsv(path, shownPath, { delimiter: "\t", ...options }),
  json: readJson,
  parquet: readParquet,
  excel: readExcel,
  duckdb: readDuckdb,
};

/**
 * Reads a file as columns, with its checksum.
 *
 * @param path - relative to the working folder, which in a notebook is the notebook's own.
 * @throws {ModelError} `path-missing` | `no-such-file` | `format-unknown` | `no-data-rows` | `unreadable-file`, and what the
 *   reader of its format asks for.
 */
export async function readTable(path: string, options: ReadOptions = {}): Promise<StoredTable> {
  if (typeof path !== "string" || path === "") throw pathMissing(path);
  const full = resolve(path);
  await refuseAbsent(full, path);
  const signature = await signatureOf(full);
  const named = options.format ?? formatOfEnding(path);
  const format = signature ?? named;
  if (format === undefined) throw formatUnknown(path, Object.keys(readers));
  if (signature === undefined && !isText(format))
    throw unreadableFile(path, format, "its first bytes are of no such file");
  const reading = readers[format](full, path, options);
  const [scan, read]: [FileScan, FileColumns] = await Promise.all([scanFile(full), reading]);
  const found = named === format ? [] : [`The file is ${format} by its contents, whatever its name says.`];
  const rows = read.columns[0]?.length ?? 0;
  if (rows === 0) throw emptyFile(path);
  const source = {
    path,
    format,
    checksum: scan.checksum,
    bytes: scan.bytes,
    rows,
    found: [...found, ...read.found],
  };
  return { names: read.names, columns: read.columns, source };
}

function isText(format: Format): boolean {
  return format === "csv" || format === "tsv" || format === "json";
}

async function refuseAbsent(full: string, path: string): Promise<void> {
  try {
    const found = await stat(full);
    if (found.isDirectory()) throw unreadableFile(path, "a record", "it is a folder");
  } catch (cause) {
    if ((cause as { code?: string }).code !== "ENOENT") throw cause;
    const beside = await readdir(dirname(full)).catch(() => []);
    const nearest = nearestNames(basename(full), beside);
    throw noSuchFile(path, process.cwd(), nearest, cause);
  }
}
