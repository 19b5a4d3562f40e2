import { readFile } from "node:fs/promises";
import type { CellObject, WorkBook, WorkSheet } from "xlsx";
import { type Column, packed } from "../record/index.js";
import { columnNames } from "./column-names.js";
import { reasonOf } from "./database.js";
import type { ReadOptions } from "./read-options.js";
import { emptyFile, formulaWithoutValue, noSuchTable, tableUnclear, unreadableFile } from "./refusals.js";
import { sheetCell } from "./sheet-cell.js";
import type { FileColumns } from "./stored-table.js";
import { workbooks } from "./workbooks.js";

/** Reads a sheet of a workbook: the one asked for, or the only one that holds cells. */
export async function readExcel(path: string, shownPath: string, options: ReadOptions): Promise<FileColumns> {
  const book = opened(await readFile(path), shownPath, path);
  const filled = book.SheetNames.filter((name) => book.Sheets[name]?.["!ref"] !== undefined);
  const { table } = options;
  if (table !== undefined && !filled.includes(table)) throw noSuchTable(shownPath, table, filled);
  if (filled.length === 0) throw emptyFile(shownPath);
  if (table === undefined && filled.length > 1) throw tableUnclear(shownPath, filled);
  const late = book.Workbook?.WBProps?.date1904 === true;
  return readSheet(gridOf(book.Sheets[table ?? filled[0]!]!, options.skip ?? 0), late, shownPath, options);
}

function opened(bytes: Buffer, shownPath: string, path: string): WorkBook {
  try {
    // Formulas are never computed here: the value saved with the file is read, and the formula only told of.
    return workbooks().read(bytes, { cellFormula: true, cellHTML: false, cellNF: true, cellText: false });
  } catch (cause) {
    throw unreadableFile(shownPath, "a workbook", reasonOf(cause, path), cause);
  }
}

/** Cells of a sheet by row, from its first filled corner on, empty rows at the end left out. */
type Grid = readonly (readonly (CellObject | undefined)[])[];

function gridOf(sheet: WorkSheet, skip: number): Grid {
  const { utils } = workbooks();
  const { s, e } = utils.decode_range(sheet["!ref"]!);
  const rows: (CellObject | undefined)[][] = [];
  for (let r = s.r + skip; r <= e.r; r++)
    rows.push(
      Array.from(
        { length: e.c - s.c + 1 },
        (_, i) => sheet[utils.encode_cell({ r, c: s.c + i })] as CellObject | undefined,
      ),
    );
  while (rows.at(-1)?.every((cell) => cell?.v === undefined && cell?.f === undefined)) rows.pop();
  return rows;
}

function readSheet(grid: Grid, late: boolean, path: string, options: ReadOptions): FileColumns {
  const [top] = grid;
  if (top === undefined) throw emptyFile(path);
  const found: string[] = [];
  const headed = options.header !== false;
  const names = columnNames(
    top.map((cell) => (headed ? String(cell?.v ?? "") : "")),
    found,
  );
  const rows = headed ? grid.slice(1) : grid;
  const missing = new Set<unknown>(options.missing);
  const columns = names.map((name, at): Column => {
    const cells = rows.map((row) => row[at]);
    noteFormulas(cells, name, path, found);
    const values = cells.map((cell) => sheetCell(cell, late));
    return packed(values.map((value) => (missing.has(value) ? null : value)));
  });
  return { names, columns, found };
}

function noteFormulas(
  cells: readonly (CellObject | undefined)[],
  name: string,
  path: string,
  found: string[],
): void {
  const empty = cells.findIndex((cell) => cell?.f !== undefined && cell.v === undefined);
  if (empty >= 0) throw formulaWithoutValue(path, empty + 1, name, cells[empty]!.f!);
  const formulas = cells.filter((cell) => cell?.f !== undefined).length;
  if (formulas > 0)
    found.push(`In "${name}" ${formulas} cells are formulas; the values saved with the file are read.`);
}
