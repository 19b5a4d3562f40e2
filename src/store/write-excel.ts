import { writeFile } from "node:fs/promises";
import type { CellObject, WorkSheet } from "xlsx";
import { count } from "../../kernel-helpers/wording/index.js";
import { type ColumnTable, rowCount } from "../record/index.js";
import { notWritableError } from "./errors.js";
import { workbooks } from "./workbooks.js";
import type { NamedTable, WriteOptions } from "./write-options.js";

/** Largest number of rows and longest text of a sheet (ECMA-376 leaves it to programs; these are the usual limits). */
const limits = { rows: 1_048_575, text: 32_767 };

/** Writes a workbook with one sheet per table. Text is written as text, even if it starts like a formula. */
export async function writeExcel(
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  _options: WriteOptions,
): Promise<void> {
  const { utils, write } = workbooks();
  const book = utils.book_new();
  const used = new Set<string>();
  for (const { name, table } of tables)
    utils.book_append_sheet(book, sheetOf(table, shownPath), sheetName(name, used));
  await writeFile(path, write(book, { type: "buffer", bookType: "xlsx", compression: true }) as Buffer);
}

function sheetOf(table: ColumnTable, path: string): WorkSheet {
  const { utils } = workbooks();
  const rows = rowCount(table);
  if (rows > limits.rows)
    throw notWritableError(
      path,
      `a sheet has room for ${count(limits.rows)} rows, and the record has ${count(rows)}`,
      "Use Parquet (.parquet) or CSV (.csv).",
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
    throw notWritableError(
      path,
      `row ${row + 1}, ${column} is longer than ${count(limits.text)} characters, the limit of a cell`,
      "Use Parquet (.parquet) or CSV (.csv).",
    );
  return { t: "s", v: text };
}

/** At most 31 characters, no forbidden ones, and unique. */
function sheetName(name: string, used: Set<string>): string {
  const plain =
    name
      .replace(/[[\]:*?/\\]/g, " ")
      .trim()
      .slice(0, 31) || "record";
  let unique = plain;
  for (let n = 2; used.has(unique.toLowerCase()); n++) unique = `${plain.slice(0, 27)} (${n})`;
  used.add(unique.toLowerCase());
  return unique;
}
