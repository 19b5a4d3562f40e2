import { readFile } from "node:fs/promises";
import { plural } from "../../kernel-helpers/wording/index.js";
import { columnNames } from "./column-names.js";
import { type TextColumn, typedColumns } from "./csv-columns.js";
import { type CsvRecord, csvRecords } from "./csv-records.js";
import { decodeText } from "./decode-text.js";
import { detectDelimiter } from "./detect-delimiter.js";
import { missingHeaderError, noDataRowsError, raggedRowError, unclosedQuoteError } from "./errors.js";
import { decimalSignOf } from "./number-notation.js";
import { plainCsvRelation } from "./plain-csv.js";
import type { ReadOptions } from "./read-options.js";
import { readPlainCsv } from "./read-plain-csv.js";
import type { FileColumns } from "./stored-table.js";
import { headBytes, textHead } from "./text-head.js";

/**
 * Reads delimited text. A plain file (UTF-8, decimal points, no ambiguous dates) is read by the database engine; any
 * other, and one that the engine rejects, is read here cell by cell.
 */
export async function readCsv(path: string, shownPath: string, options: ReadOptions): Promise<FileColumns> {
  const { encoding, skip, missing, header = true } = options;
  const mayBePlain = encoding === undefined && skip === undefined && missing === undefined && header;
  const head = mayBePlain ? await textHead(path) : undefined;
  if (head !== undefined) {
    const delimiter = options.delimiter ?? detectDelimiter(head, shownPath);
    const relation = plainCsvRelation(path, head, delimiter, options);
    const read = relation === undefined ? undefined : await readPlainCsv(relation);
    if (read !== undefined) return read;
  }
  const text = decodeText(await readFile(path), shownPath, encoding);
  return readText(skipLines(text, skip ?? 0), shownPath, options);
}

function skipLines(text: string, lines: number): string {
  let at = 0;
  for (let n = 0; n < lines; n++) {
    const next = /\r\n|\r|\n/g;
    next.lastIndex = at;
    at = next.exec(text) === null ? text.length : next.lastIndex;
  }
  return text.slice(at);
}

/** Reads delimited text cell by cell. */
function readText(text: string, path: string, options: ReadOptions): FileColumns {
  const delimiter = options.delimiter ?? detectDelimiter(wholeLines(text), path);
  const records = recordsOf(text, delimiter, path);
  if (records.length === 0) throw noDataRowsError(path);
  const found: string[] = [];
  const width = records[0]!.cells.length;
  const header = headerOf(records, path, options);
  const names = columnNames(header, found);
  const rows = withoutEmptyTail(options.header === false ? records : records.slice(1), found);
  rows.forEach((record, i) => {
    if (record.cells.length !== width)
      throw raggedRowError(path, i + 1, record.line, record.cells.length, width);
  });
  const missing = new Set(options.missing);
  const texts = names.map((name, at): TextColumn => {
    const cells = rows.map(({ cells }) => (cells[at] === "" || missing.has(cells[at]!) ? null : cells[at]!));
    return { name, cells };
  });
  const typed = typedColumns(texts, delimiter, options);
  return { names, columns: typed.columns, found: [...found, ...typed.found] };
}

function wholeLines(text: string): string {
  return text.length <= headBytes ? text : text.slice(0, text.lastIndexOf("\n", headBytes) + 1);
}

function recordsOf(text: string, delimiter: string, path: string): CsvRecord[] {
  const records: CsvRecord[] = [];
  const reading = csvRecords(text, delimiter);
  for (;;) {
    const next = reading.next();
    if (!next.done) records.push(next.value);
    else if (next.value !== undefined) throw unclosedQuoteError(path, next.value.unclosedQuoteAt);
    else return records;
  }
}

/** The first row, which must contain names: a row of numbers is data without a header. */
function headerOf(records: readonly CsvRecord[], path: string, options: ReadOptions): readonly string[] {
  const first = records[0]!.cells;
  if (options.header === false) return first.map(() => "");
  if (isAllNumbers(first)) throw missingHeaderError(path, first);
  return first;
}

function isAllNumbers(cells: readonly string[]): boolean {
  return cells.every((cell) => decimalSignOf(cell) !== undefined);
}

function withoutEmptyTail(rows: readonly CsvRecord[], found: string[]): readonly CsvRecord[] {
  let end = rows.length;
  while (end > 0 && rows[end - 1]!.cells.every((cell) => cell.trim() === "")) end--;
  if (end < rows.length) found.push(`Skipped ${plural(rows.length - end, "empty row")} at the end.`);
  return rows.slice(0, end);
}
