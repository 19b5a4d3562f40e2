import type { CellObject } from "xlsx";
import { workbooks } from "./workbooks.js";

/** Cell errors by their code in the file. */
const errors: Readonly<Record<number, string>> = {
  0: "#NULL!",
  7: "#DIV/0!",
  15: "#VALUE!",
  23: "#REF!",
  29: "#NAME?",
  36: "#NUM!",
  42: "#N/A",
};

/**
 * The value of a sheet cell: a number, a boolean, a text, or a date as ISO text; an error as its text, such as #N/A;
 * null when empty.
 *
 * @param since1904 - whether the workbook counts days from 1904.
 */
export function sheetCellValue(cell: CellObject | undefined, since1904: boolean): unknown {
  if (cell?.v === undefined || cell.t === "z") return null;
  if (cell.t === "e") return errors[Number(cell.v)] ?? `#${String(cell.v)}`;
  const isDate = cell.t === "n" && typeof cell.z === "string" && workbooks().SSF.is_date(cell.z);
  if (isDate) return dateFromSerial(Number(cell.v), since1904);
  return cell.v instanceof Date ? cell.v.toISOString() : cell.v;
}

/** Serial date as ISO text: day 1 is 1900-01-01 (with the 29 February 1900 that never was), or day 0 is 1904-01-01. */
function dateFromSerial(day: number, since1904: boolean): string {
  const sinceUnix = since1904 ? day - 24107 : day - (day < 60 ? 25568 : 25569);
  const text = new Date(Math.round(sinceUnix * 86_400) * 1000).toISOString();
  return Number.isInteger(day) ? text.slice(0, 10) : text.slice(0, 19).replace("T", " ");
}
