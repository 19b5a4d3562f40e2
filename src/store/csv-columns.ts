import { plural } from "../../kernel-helpers/wording/index.js";
import { type Column, packed } from "../record/index.js";
import { type DateOrder, isoDate, possibleDateOrders, unambiguousDate } from "./date-notation.js";
import { ambiguousDateError, mixedDatesError, unclearDecimalSignError } from "./errors.js";
import { decimalSignOf, isNegative, parseNumber } from "./number-notation.js";
import type { ReadOptions } from "./read-options.js";

/** Cells of one column as text; null where empty. */
export interface TextColumn {
  readonly name: string;
  readonly cells: readonly (string | null)[];
}

/** Columns with their numbers and dates read, and notes for the reader. */
export interface TypedColumns {
  readonly columns: readonly Column[];
  readonly found: readonly string[];
}

/** From this share of numbers on a column counts as numeric, and its other cells as errors in it. */
const numericShare = 0.8;

/**
 * Reads the numbers and dates of text columns. A cell of a numeric column that is not a number is kept as text, so
 * that a later error can name its row.
 *
 * @throws {ModelError} `decimal-sign-unclear` | `ambiguous-date` | `mixed-dates`.
 */
export function typedColumns(
  texts: readonly TextColumn[],
  delimiter: string,
  options: ReadOptions,
): TypedColumns {
  const numbers = texts.filter(({ cells }) => isNumericColumn(cells));
  const decimal = options.decimal ?? decimalSignOfColumns(numbers, delimiter);
  const found: string[] = [];
  if (decimal === ",") found.push("Numbers are read with a decimal comma.");
  const columns = texts.map((text): Column => {
    if (numbers.includes(text)) return numberColumn(text, decimal, found);
    return options.dates === "text" ? text.cells : (dateColumn(text, options.dates, found) ?? text.cells);
  });
  return { columns, found };
}

/** A code with leading zeros or too many digits makes the whole column one of codes. */
function isNumericColumn(cells: readonly (string | null)[]): boolean {
  let [numbers, others] = [0, 0];
  for (const cell of cells) {
    if (cell === null || cell.trim() === "") continue;
    if (decimalSignOf(cell) !== undefined) numbers++;
    else if (/^\d+$/.test(cell.trim())) return false;
    else others++;
  }
  return numbers > 0 && numbers >= numericShare * (numbers + others);
}

function everyCell(cells: readonly (string | null)[], test: (cell: string) => boolean): boolean {
  const written = cells.filter((cell): cell is string => cell !== null && cell.trim() !== "");
  return written.length > 0 && written.every(test);
}

/** The one decimal sign that the number columns of a file use. */
function decimalSignOfColumns(columns: readonly TextColumn[], delimiter: string): "." | "," {
  let known: "." | "," | undefined;
  let unclear: SignedCell | undefined;
  for (const signed of cellsWithSign(columns)) {
    if (signed.sign === "either") unclear ??= signed;
    else if (known === undefined) known = signed.sign;
    else if (signed.sign !== known) throw unclearDecimalSignError(signed.row, signed.name, signed.cell);
  }
  // A file delimited by commas has decimal points: with decimal commas every number would have to be quoted.
  // (Common practice of spreadsheet programs, no source.)
  if (known !== undefined || unclear === undefined || delimiter === ",") return known ?? ".";
  throw unclearDecimalSignError(unclear.row, unclear.name, unclear.cell);
}

interface SignedCell {
  readonly row: number;
  readonly name: string;
  readonly cell: string;
  readonly sign: "." | "," | "either";
}

/** The cells of numeric columns that contain a comma or a point. */
function* cellsWithSign(columns: readonly TextColumn[]): Generator<SignedCell> {
  for (const { name, cells } of columns) {
    for (let i = 0; i < cells.length; i++) {
      const cell = cells[i] ?? "";
      const sign = decimalSignOf(cell);
      if (sign !== undefined && sign !== "none") yield { row: i + 1, name, cell, sign };
    }
  }
}

function numberColumn(text: TextColumn, decimal: "." | ",", found: string[]): Column {
  let credits = 0;
  const bad: number[] = [];
  const cells = text.cells.map((cell, i) => {
    if (cell === null || cell.trim() === "") return null;
    const value = parseNumber(cell, decimal);
    if (value === undefined) bad.push(i);
    else if (value < 0 && !/^[-\u2212]/.test(cell.trim()) && isNegative(cell)) credits++;
    return value ?? cell;
  });
  if (credits > 0)
    found.push(
      `Column "${text.name}": read ${plural(credits, "amount")} in brackets or with a trailing minus as negative.`,
    );
  if (bad.length > 0) found.push(notNumbersNote(text, bad));
  return packed(cells);
}

function notNumbersNote({ name, cells }: TextColumn, bad: readonly number[]): string {
  const [first] = bad;
  const more = bad.length > 1 ? ` (and ${plural(bad.length - 1, "more row", "more rows")})` : "";
  return `Column "${name}" has numbers, but row ${first! + 1} is "${cells[first!]}"${more}; such cells are kept as text.`;
}

function dateColumn(
  text: TextColumn,
  asked: DateOrder | undefined,
  found: string[],
): readonly (string | null)[] | undefined {
  if (everyCell(text.cells, (cell) => unambiguousDate(cell) !== undefined))
    return text.cells.map((cell) => (cell === null ? null : (unambiguousDate(cell) ?? null)));
  if (!everyCell(text.cells, (cell) => possibleDateOrders(cell) !== undefined)) return undefined;
  const order = asked ?? orderOf(text);
  found.push(`Dates in column "${text.name}" are read as ${order}.`);
  return text.cells.map((cell, i) => {
    if (cell === null || cell.trim() === "") return null;
    const iso = isoDate(cell, order);
    if (iso === undefined) throw mixedDatesError(i + 1, text.name, cell, order);
    return iso;
  });
}

/** The order that fits every cell; a cell that fits only one order decides. */
function orderOf({ name, cells }: TextColumn): DateOrder {
  let known: DateOrder | undefined;
  for (let i = 0; i < cells.length; i++) {
    const orders = possibleDateOrders(cells[i] ?? "");
    if (orders?.length !== 1) continue;
    if (known !== undefined && orders[0] !== known) throw mixedDatesError(i + 1, name, cells[i]!, known);
    known = orders[0];
  }
  if (known !== undefined) return known;
  const first = cells.findIndex((cell) => cell !== null && cell.trim() !== "");
  throw ambiguousDateError(first + 1, name, cells[first]!);
}
