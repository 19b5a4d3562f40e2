import { type Column, isEmpty } from "../record/index.js";
import { columnNames } from "./column-names.js";
import { csvRecords } from "./csv-records.js";
import { quoted, withDatabase } from "./database.js";
import { dateOrdersOf, plainDate } from "./date-form.js";
import { decimalSignOf } from "./number-form.js";
import type { ReadOptions } from "./read-options.js";
import type { FileColumns } from "./stored-table.js";
import { streamColumns } from "./stream-columns.js";

const looked = 5000;

type PlainForm = "number" | "text";

/**
 * Reads a file by the database engine where its first rows are plain, or gives undefined: where a cell needs to
 * be looked at, or where the engine refuses a row that the first ones did not foretell.
 */
export async function readPlainCsv(
  path: string,
  head: string,
  delimiter: string,
  options: ReadOptions,
): Promise<FileColumns | undefined> {
  const rows: (readonly string[])[] = [];
  for (const { cells } of csvRecords(head, delimiter)) if (rows.push(cells) > looked) break;
  const header = rows.shift();
  if (header === undefined || header.length < 2 || rows.length === 0 || options.header === false)
    return undefined;
  if (options.decimal === "," || rows.some((cells) => cells.length !== header.length)) return undefined;
  const forms = header.map((_, at) => formOf(rows, at, delimiter));
  if (forms.includes(undefined) || header.every((cell) => decimalSignOf(cell) !== undefined))
    return undefined;
  const found: string[] = [];
  const names = columnNames(header, found);
  // Whatever the engine refuses is read again where the reason can be told with row, column and value.
  const columns = await typedRead(path, delimiter, forms as PlainForm[]).catch(() => undefined);
  return columns === undefined ? undefined : { names, columns, found };
}

/** Undefined when the column holds anything that must be looked at cell by cell. */
function formOf(rows: readonly (readonly string[])[], at: number, delimiter: string): PlainForm | undefined {
  const forms = new Set<PlainForm | undefined>();
  for (const cells of rows) if (cells[at] !== "") forms.add(cellForm(cells[at]!, delimiter));
  return forms.size === 1 ? [...forms][0] : undefined;
}

function cellForm(cell: string, delimiter: string): PlainForm | undefined {
  const sign = decimalSignOf(cell);
  if (sign === undefined) return (dateOrdersOf(cell) ?? plainDate(cell)) === undefined ? "text" : undefined;
  // Digits with a point, as the engine reads them; "1.234" is plain only where commas separate the cells.
  const plain = /^-?[\d.]+(e[+-]?\d+)?$/i.test(cell) && (sign !== "either" || delimiter === ",");
  return plain ? "number" : undefined;
}

async function typedRead(
  path: string,
  delimiter: string,
  forms: readonly PlainForm[],
): Promise<readonly Column[]> {
  const types = forms.map((form, i) => `'c${i}': '${form === "number" ? "DOUBLE" : "VARCHAR"}'`).join(", ");
  // Without empty cells a vector of numbers is read without asking each item whether it is there.
  const selected = forms.map((form, i) => (form === "number" ? `coalesce(c${i}, 'nan'::DOUBLE)` : `c${i}`));
  const query =
    `SELECT ${selected.join(", ")} FROM read_csv(${quoted(path)}, auto_detect = false, header = true, ` +
    `delim = ${quoted(delimiter)}, quote = '"', escape = '"', strict_mode = true, null_padding = false, ` +
    `allow_quoted_nulls = false, nullstr = '', columns = {${types}})`;
  const columns = await withDatabase((connection) => streamColumns(connection, query, forms));
  const last = (columns[0]?.length ?? 0) - 1;
  if (last < 0 || columns.every((column) => isEmpty(column[last]))) throw new Error("an empty tail");
  for (const column of columns) if (column instanceof Float64Array) refuseLong(column);
  return columns;
}

/** A whole number past 2^53 may have lost digits on the way: such a column is read again, cell by cell. */
function refuseLong(values: Float64Array): void {
  for (const value of values)
    if (Math.abs(value) >= Number.MAX_SAFE_INTEGER) throw new Error("a number too long to keep");
}
