import { writeFile } from "node:fs/promises";
import type { CellObject, WorkSheet } from "xlsx";
import { type ColumnTable, rowCount } from "../record/index.js";
import { notWritable } from "./refusals.js";
import { workbooks } from "./workbooks.js";
import type { NamedTable, WriteOptions } from "./write-options.js";

/** The most rows and the longest text that a sheet holds (ECMA-376 leaves it to programs; these are the usual limits). */
const limits = { rows: 1_048_575, text: 32_767 };

/** Writes a workbook with one sheet a table. A text is written as text, whatever it begins with. */
export async function writeExcel(
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  _options: WriteOptions,
): Promise<void> {
  const { utils, write } = workbooks();
  const book = utils.book_new();
  const taken = new Set<string>();
  for (const { name, table } of tables)
    utils.book_append_sheet(book, sheetOf(table, shownPath), sheetName(name, taken));
  await writeFile(path, write(book, { type: "buffer", bookType: "xlsx", compression: true }) as Buffer);
}

function sheetOf(table: ColumnTable, path: string): WorkSheet {
  const { utils } = workbooks();
  const rows = rowCount(table);
  if (rows > limits.rows)
    throw notWritable(
      path,
      `a sheet holds ${limits.rows} rows and the record has ${rows}`,
      "Write Parquet or CSV.",
    );
  const sheet: WorkSheet = {};
  table.names.forEach((name, c) => {
    sheet[utils.encode_cell({ r: 0, c })] = { t: "s", v: name };
    for (let row = 0; row < rows; row++) {
      const cell = cellOf(table.columns[c]![row], path, row, name);
      if (cell !== undefined) sheet[utils.encode_cell({ r: row + 1, c })] = cell;
    }
  });
  sheet["!ref"] = utils.encode_range({
    s: { r: 0, c: 0 },
    e: { r: rows, c: Math.max(0, table.names.length - 1) },
  });
  return sheet;
}

function cellOf(cell: unknown, path: string, row: number, column: string): CellObject | undefined {
  if (cell === null || cell === undefined || Number.isNaN(cell)) return undefined;
  if (typeof cell === "boolean") return { t: "b", v: cell };
  if (typeof cell === "number" && Number.isFinite(cell)) return { t: "n", v: cell };
  const text = cell instanceof Date ? cell.toISOString() : String(cell);
  if (text.length > limits.text)
    throw notWritable(
      path,
      `row ${row + 1}, ${column} is longer than a sheet's cell holds`,
      "Write Parquet or CSV.",
    );
  return { t: "s", v: text };
}

/** At most 31 characters, none of those that sheet names forbid, and no two alike. */
function sheetName(name: string, taken: Set<string>): string {
  const plain =
    name
      .replace(/[[\]:*?/\\]/g, " ")
      .trim()
      .slice(0, 31) || "record";
  let free = plain;
  for (let n = 2; taken.has(free.toLowerCase()); n++) free = `${plain.slice(0, 27)} (${n})`;
  taken.add(free.toLowerCase());
  return free;
}
