import { readdir, stat } from "node:fs/promises";
import { basename, dirname, resolve } from "node:path";
import { nearestNames } from "../numeric/index.js";
import { type FileChecksum, fileChecksum } from "./checksum.js";
import {
  fileNotFoundError,
  folderGivenError,
  missingPathError,
  noDataRowsError,
  unknownFormatError,
  unreadableFileError,
} from "./errors.js";
import { formatOfExtension } from "./file-extension.js";
import { readCsv } from "./read-csv.js";
import { readDuckdb } from "./read-duckdb.js";
import { readExcel } from "./read-excel.js";
import { readJson } from "./read-json.js";
import type { Format, ReadOptions } from "./read-options.js";
import { readParquet } from "./read-parquet.js";
import { formatOfSignature } from "./signature.js";
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
 * @param path - relative to the working folder; in a notebook, the folder of the notebook.
 * @throws {ModelError} `path-missing` | `no-such-file` | `format-unknown` | `no-data-rows` | `unreadable-file`, and the errors of
 *   the reader of its format.
 */
export async function readTable(path: string, options: ReadOptions = {}): Promise<StoredTable> {
  if (typeof path !== "string" || path === "") throw missingPathError(path);
  const full = resolve(path);
  await requireFile(full, path);
  const signature = await formatOfSignature(full);
  const named = options.format ?? formatOfExtension(path);
  const format = signature ?? named;
  if (format === undefined) throw unknownFormatError(path, Object.keys(readers));
  if (signature === undefined && !isText(format))
    throw unreadableFileError(path, format, "it does not start like a file of this format");
  const reading = readers[format](full, path, options);
  const [checksum, read]: [FileChecksum, FileColumns] = await Promise.all([fileChecksum(full), reading]);
  const found =
    named === format ? [] : [`The file is read as ${format}: its contents do not match its extension.`];
  const rows = read.columns[0]?.length ?? 0;
  if (rows === 0) throw noDataRowsError(path);
  const source = {
    path,
    format,
    checksum: checksum.checksum,
    bytes: checksum.bytes,
    rows,
    found: [...found, ...read.found],
  };
  return { names: read.names, columns: read.columns, source };
}

function isText(format: Format): boolean {
  return format === "csv" || format === "tsv" || format === "json";
}

async function requireFile(full: string, path: string): Promise<void> {
  try {
    const found = await stat(full);
    if (found.isDirectory()) throw folderGivenError(path);
  } catch (cause) {
    if ((cause as { code?: string }).code !== "ENOENT") throw cause;
    const neighbours = await readdir(dirname(full)).catch(() => []);
    const nearest = nearestNames(basename(full), neighbours);
    throw fileNotFoundError(path, process.cwd(), nearest, cause);
  }
}
