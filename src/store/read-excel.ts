import { readFile } from "node:fs/promises";
import type { CellObject, WorkBook, WorkSheet } from "xlsx";
import { plural } from "../../kernel-helpers/wording/index.js";
import { type Column, packed } from "../record/index.js";
import { columnNames } from "./column-names.js";
import { firstLineOf } from "./database.js";
import {
  formulaWithoutValueError,
  noDataRowsError,
  tableNotFoundError,
  unclearTableError,
  unreadableFileError,
} from "./errors.js";
import type { ReadOptions } from "./read-options.js";
import { sheetCellValue } from "./sheet-cell.js";
import type { FileColumns } from "./stored-table.js";
import { workbooks } from "./workbooks.js";

/** Reads a sheet of a workbook: the one named, or the only one that has cells. */
export async function readExcel(path: string, shownPath: string, options: ReadOptions): Promise<FileColumns> {
  const book = parseWorkbook(await readFile(path), shownPath, path);
  const filled = book.SheetNames.filter((name) => book.Sheets[name]?.["!ref"] !== undefined);
  const { table } = options;
  if (table !== undefined && !filled.includes(table)) throw tableNotFoundError(shownPath, table, filled);
  if (filled.length === 0) throw noDataRowsError(shownPath);
  if (table === undefined && filled.length > 1) throw unclearTableError(shownPath, filled);
  const since1904 = book.Workbook?.WBProps?.date1904 === true;
  return readSheet(
    gridOf(book.Sheets[table ?? filled[0]!]!, options.skip ?? 0),
    since1904,
    shownPath,
    options,
  );
}

function parseWorkbook(bytes: Buffer, shownPath: string, path: string): WorkBook {
  try {
    // Formulas are not computed: the value saved with the file is read, and the formula is only reported.
    return workbooks().read(bytes, { cellFormula: true, cellHTML: false, cellNF: true, cellText: false });
  } catch (cause) {
    throw unreadableFileError(shownPath, "a workbook", firstLineOf(cause, path), cause);
  }
}

/** Cells of a sheet by row, from its first filled corner on, without the empty rows at the end. */
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

function readSheet(grid: Grid, since1904: boolean, path: string, options: ReadOptions): FileColumns {
  const [top] = grid;
  if (top === undefined) throw noDataRowsError(path);
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
    const values = cells.map((cell) => sheetCellValue(cell, since1904));
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
  if (empty >= 0) throw formulaWithoutValueError(path, empty + 1, name, cells[empty]!.f!);
  const formulas = cells.filter((cell) => cell?.f !== undefined).length;
  if (formulas > 0) found.push(`Column "${name}": read the saved value of ${plural(formulas, "formula")}.`);
}
