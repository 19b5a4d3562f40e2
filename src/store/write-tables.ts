import { copyFile, rename, rm, stat } from "node:fs/promises";
import { basename, dirname, join, resolve } from "node:path";
import { notWritableError, unknownFormatError } from "./errors.js";
import { formatOfExtension } from "./file-extension.js";
import type { Format } from "./read-options.js";
import { holdsSeveralTables } from "./several-tables.js";
import { writeCsv } from "./write-csv.js";
import { writeDuckdb } from "./write-duckdb.js";
import { writeExcel } from "./write-excel.js";
import { writeJson } from "./write-json.js";
import type { NamedTable, WriteOptions, Writer } from "./write-options.js";
import { writeParquet } from "./write-parquet.js";

const writers: Readonly<Record<Format, Writer>> = {
  csv: writeCsv,
  tsv: (tables, path, shownPath, options) =>
    writeCsv(tables, path, shownPath, { delimiter: "\t", ...options }),
  json: writeJson,
  parquet: writeParquet,
  excel: writeExcel,
  duckdb: writeDuckdb,
};

/**
 * Writes tables to a file atomically: the previous file is replaced only by a complete one. Other tables of a database
 * file are kept.
 *
 * @throws {ModelError} `format-unknown` | `not-writable`.
 */
export async function writeTables(
  tables: readonly NamedTable[],
  path: string,
  options: WriteOptions = {},
): Promise<void> {
  const format = options.format ?? formatOfExtension(path);
  if (format === undefined) throw unknownFormatError(path, Object.keys(writers));
  if (tables.length > 1 && !holdsSeveralTables(path, format))
    throw notWritableError(
      path,
      `there are ${tables.length} tables, and this format holds one`,
      "Use an Excel workbook (.xlsx), or write one of the tables.",
    );
  const full = resolve(path);
  const temporary = join(dirname(full), `.${basename(full)}.${crypto.randomUUID().slice(0, 8)}`);
  try {
    if (format === "duckdb" && (await exists(full))) await copyFile(full, temporary);
    await writers[format](tables, temporary, path, options);
    await rename(temporary, full);
  } catch (cause) {
    await rm(temporary, { force: true });
    throw (cause as { code?: string }).code === "ENOENT"
      ? notWritableError(path, "its folder does not exist", "Create the folder, or choose another path.")
      : cause;
  }
}

async function exists(path: string): Promise<boolean> {
  return (await stat(path).catch(() => undefined)) !== undefined;
}
