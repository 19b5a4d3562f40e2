import { readdir, stat } from "node:fs/promises";
import { basename, dirname, extname, resolve } from "node:path";
import { nearestNames } from "../numeric/index.js";
import { type ReadColumns, readCsv } from "./read-csv.js";
import type { Format, ReadOptions } from "./read-options.js";
import { emptyFile, formatUnknown, noSuchFile, unreadableFile } from "./refusals.js";
import { type FileScan, scanFile } from "./scan-file.js";
import type { StoredTable } from "./stored-table.js";

const readers: Readonly<
  Partial<Record<Format, (path: string, shown: string, options: ReadOptions) => Promise<ReadColumns>>>
> = {
  csv: readCsv,
  tsv: (path, shown, options) => readCsv(path, shown, { delimiter: "\t", ...options }),
};

const endings: Readonly<Record<string, Format>> = {
  ".csv": "csv",
  ".txt": "csv",
  ".tsv": "tsv",
  ".tab": "tsv",
};

/**
 * Reads a file as columns, with its checksum.
 *
 * @param path - relative to the working folder, which in a notebook is the notebook's own.
 * @throws {ModelError} `no-such-file` | `format-unknown` | `no-data-rows` | `unreadable-file`, and what the
 *   reader of its format asks for.
 */
export async function readTable(path: string, options: ReadOptions = {}): Promise<StoredTable> {
  const full = resolve(path);
  const format = options.format ?? endings[extname(path).toLowerCase()];
  await refuseAbsent(full, path);
  const reader = format === undefined ? undefined : readers[format];
  if (format === undefined || reader === undefined) throw formatUnknown(path, Object.keys(readers));
  const [scan, read]: [FileScan, ReadColumns] = await Promise.all([
    scanFile(full),
    reader(full, path, options),
  ]);
  const rows = read.columns[0]?.length ?? 0;
  if (rows === 0) throw emptyFile(path);
  const source = Object.freeze({
    path,
    format,
    checksum: scan.checksum,
    bytes: scan.bytes,
    rows,
    found: Object.freeze([...read.found]),
  });
  return Object.freeze({ names: read.names, columns: read.columns, source });
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
