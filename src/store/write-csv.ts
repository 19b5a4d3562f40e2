import { createWriteStream } from "node:fs";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { type ColumnTable, rowCount } from "../record/index.js";
import type { NamedTable, WriteOptions } from "./write-options.js";

const rowsAtOnce = 10_000;

/** Writes delimited text: UTF-8, every double in the shortest form that reads back exactly, a missing cell as nothing. */
export async function writeCsv(
  tables: readonly NamedTable[],
  path: string,
  _shownPath: string,
  { delimiter = "," }: WriteOptions,
): Promise<void> {
  await pipeline(Readable.from(pieces(tables[0]!.table, delimiter)), createWriteStream(path));
}

function* pieces(table: ColumnTable, delimiter: string): Generator<string> {
  const line = (cells: readonly unknown[]): string =>
    `${cells.map((cell) => cellText(cell, delimiter)).join(delimiter)}\n`;
  yield line(table.names);
  const rows = rowCount(table);
  for (let from = 0; from < rows; from += rowsAtOnce) {
    let text = "";
    const to = Math.min(rows, from + rowsAtOnce);
    for (let row = from; row < to; row++) text += line(table.columns.map((column) => column[row]));
    yield text;
  }
}

/** An empty string is quoted, to distinguish it from a missing cell. */
function cellText(cell: unknown, delimiter: string): string {
  if (cell === null || cell === undefined || Number.isNaN(cell)) return "";
  if (typeof cell === "number") return numberText(cell);
  const text = cell instanceof Date ? cell.toISOString() : String(cell);
  const plain = text !== "" && text.trim() === text && !text.includes(delimiter) && !/["\r\n]/.test(text);
  return plain ? text : `"${text.replaceAll('"', '""')}"`;
}

/** The shortest digits that read back exactly; integers of sixteen digits and more with an exponent, so that they are not read as codes. */
export function numberText(value: number): string {
  if (Object.is(value, -0)) return "-0";
  return Number.isInteger(value) && Math.abs(value) >= 1e15 ? value.toExponential() : String(value);
}
