import { randomUUID } from "node:crypto";
import { copyFile, rename, rm, stat } from "node:fs/promises";
import { basename, dirname, join, resolve } from "node:path";
import { formatOfEnding } from "./format-of-ending.js";
import { holdsSeveral } from "./holds-several.js";
import type { Format } from "./read-options.js";
import { formatUnknown, notWritable } from "./refusals.js";
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
 * Writes tables to a file, whole or not at all: what stood there before is replaced only by a finished file.
 * In a database file other tables stay as they were.
 *
 * @throws {ModelError} `format-unknown` | `not-writable`.
 */
export async function writeTables(
  tables: readonly NamedTable[],
  path: string,
  options: WriteOptions = {},
): Promise<void> {
  const format = options.format ?? formatOfEnding(path);
  if (format === undefined) throw formatUnknown(path, Object.keys(writers));
  if (tables.length > 1 && !holdsSeveral(path, format))
    throw notWritable(
      path,
      `there are ${tables.length} tables and the file holds one`,
      "Write a workbook (.xlsx), or one table of them.",
    );
  const full = resolve(path);
  const draft = join(dirname(full), `.${basename(full)}.${randomUUID().slice(0, 8)}`);
  try {
    if (format === "duckdb" && (await exists(full))) await copyFile(full, draft);
    await writers[format](tables, draft, path, options);
    await rename(draft, full);
  } catch (cause) {
    await rm(draft, { force: true });
    throw (cause as { code?: string }).code === "ENOENT"
      ? notWritable(path, "its folder does not exist", "Make the folder first, or write elsewhere.")
      : cause;
  }
}

async function exists(path: string): Promise<boolean> {
  return (await stat(path).catch(() => undefined)) !== undefined;
}
