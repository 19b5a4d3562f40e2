import { writeFile } from "node:fs/promises";
import { rowCount } from "../record/index.js";
import { notWritableError } from "./errors.js";
import { numberText } from "./write-csv.js";
import type { NamedTable, WriteOptions } from "./write-options.js";

/** Writes JSON: an array of row objects, one per line; a missing cell is null. */
export async function writeJson(
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  _options: WriteOptions,
): Promise<void> {
  const { table } = tables[0]!;
  const rows = Array.from({ length: rowCount(table) }, (_, row) => {
    // Built by hand, because "__proto__" would be lost as a key of an object.
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
    throw notWritableError(
      path,
      `JSON cannot represent infinity (row ${row + 1}, ${column})`,
      "Use Parquet (.parquet) or CSV (.csv), or correct the value.",
    );
  return numberText(cell);
}
