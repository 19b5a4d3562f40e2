import { readFile } from "node:fs/promises";
import { createRequire } from "node:module";
import type { CellObject, WorkBook, WorkSheet } from "xlsx";
import { packed } from "../record/index.js";
import { columnNames } from "./column-names.js";
import { reasonOf } from "./database.js";
import type { ReadOptions } from "./read-options.js";
import { emptyFile, formulaWithoutValue, noSuchTable, tableUnclear, unreadableFile } from "./refusals.js";
import type { FileColumns } from "./stored-table.js";

/** The spreadsheet library, loaded when a workbook is first read or written. */
export function workbooks(): typeof import("xlsx") {
  return createRequire(__filename)("xlsx") as typeof import("xlsx");
}

/** Reads a sheet of a workbook: the one asked for, or the only one that holds cells. */
export async function readExcel(path: string, shownPath: string, options: ReadOptions): Promise<FileColumns> {
  const bytes = await readFile(path);
  const book = opened(bytes, shownPath, path);
  const filled = book.SheetNames.filter((name) => book.Sheets[name]?.["!ref"] !== undefined);
  if (options.table !== undefined && !filled.includes(options.table))
    throw noSuchTable(shownPath, options.table, filled);
  if (filled.length === 0) throw emptyFile(shownPath);
  if (options.table === undefined && filled.length > 1) throw tableUnclear(shownPath, filled);
  const sheet = book.Sheets[options.table ?? filled[0]!]!;
  return readSheet(sheet, book, shownPath, options);
}

function opened(bytes: Buffer, shownPath: string, path: string): WorkBook {
  try {
    // Formulas are never computed here: the value saved with the file is read, and the formula only told of.
    return workbooks().read(bytes, {
      cellFormula: true,
      cellHTML: false,
      cellNF: true,
      cellText: false,
      dense: false,
    });
  } catch (cause) {
    throw unreadableFile(shownPath, "a workbook", reasonOf(cause, path), cause);
  }
}

function readSheet(sheet: WorkSheet, book: WorkBook, path: string, options: ReadOptions): FileColumns {
  const { utils } = workbooks();
  const range = utils.decode_range(sheet["!ref"]!);
  const top = range.s.r + (options.skip ?? 0);
  const found: string[] = [];
  const at = (row: number, column: number): CellObject | undefined =>
    sheet[utils.encode_cell({ r: row, c: column })] as CellObject | undefined;
  const places = Array.from({ length: range.e.c - range.s.c + 1 }, (_, i) => range.s.c + i);
  const header = places.map((column) => (options.header === false ? "" : String(at(top, column)?.v ?? "")));
  const names = columnNames(header, found);
  const first = options.header === false ? top : top + 1;
  const last = lastFilledRow(first, range.e.r, places, at);
  const late = book.Workbook?.WBProps?.date1904 === true;
  const missing = new Set<unknown>(options.missing);
  const columns = places.map((column, i) => {
    let formulas = 0;
    const cells = Array.from({ length: Math.max(0, last - first + 1) }, (_, row) => {
      const cell = at(first + row, column);
      if (cell?.f !== undefined) formulas++;
      if (cell?.f !== undefined && cell.v === undefined)
        throw formulaWithoutValue(path, row + 1, names[i]!, cell.f);
      return cellValue(cell, late, missing);
    });
    if (formulas > 0)
      found.push(`In "${names[i]}" ${formulas} cells are formulas; the values saved with the file are read.`);
    return packed(cells);
  });
  return { names, columns, found };
}

function lastFilledRow(
  first: number,
  last: number,
  places: readonly number[],
  at: (row: number, column: number) => CellObject | undefined,
): number {
  let row = last;
  while (row >= first && places.every((column) => at(row, column)?.v === undefined)) row--;
  return row;
}

/** A number, a truth value, a text, or a date as ISO text; an error of the sheet stays its text, such as #N/A. */
function cellValue(cell: CellObject | undefined, late: boolean, missing: ReadonlySet<unknown>): unknown {
  if (cell?.v === undefined || cell.t === "z" || missing.has(cell.v)) return null;
  if (cell.t === "e") return cell.w ?? String(cell.v);
  if (cell.t === "n" && typeof cell.z === "string" && workbooks().SSF.is_date(cell.z))
    return dateOf(Number(cell.v), late);
  return cell.v instanceof Date ? cell.v.toISOString() : cell.v;
}

/** Day number of a workbook as ISO text: day 1 is 1900-01-01 (and a day 60 that never was), or 0 is 1904-01-01. */
function dateOf(day: number, late: boolean): string {
  const sinceUnix = late ? day - 24107 : day - (day < 60 ? 25568 : 25569);
  const text = new Date(Math.round(sinceUnix * 86_400) * 1000).toISOString();
  return Number.isInteger(day) ? text.slice(0, 10) : text.slice(0, 19).replace("T", " ");
}
