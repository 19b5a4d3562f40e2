import { writeFile } from "node:fs/promises";
import { rowCount } from "../record/index.js";
import { notWritable } from "./refusals.js";
import { numberText } from "./write-csv.js";
import type { NamedTable, WriteOptions } from "./write-options.js";

/** Writes JSON: an array of row objects, one a line; a missing cell is null. */
export async function writeJson(
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  _options: WriteOptions,
): Promise<void> {
  const { table } = tables[0]!;
  const rows = Array.from({ length: rowCount(table) }, (_, row) => {
    // Written by hand, because as a key of an object "__proto__" would not be a column.
    const cells = table.columns.map(
      (column, i) =>
        `${JSON.stringify(table.names[i])}: ${cellJson(column[row], shownPath, row, table.names[i]!)}`,
    );
    return `{${cells.join(", ")}}`;
  });
  await writeFile(path, `[\n${rows.join(",\n")}\n]\n`);
}

function cellJson(cell: unknown, path: string, row: number, column: string): string {
  if (cell === null || cell === undefined || Number.isNaN(cell)) return "null";
  if (typeof cell !== "number") return JSON.stringify(typeof cell === "bigint" ? String(cell) : cell);
  if (!Number.isFinite(cell))
    throw notWritable(
      path,
      `JSON has no infinite number (row ${row + 1}, ${column})`,
      "Write Parquet or CSV, or correct the value.",
    );
  return numberText(cell);
}
