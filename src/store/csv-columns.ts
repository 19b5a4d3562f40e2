import { type Column, packed } from "../record/index.js";
import { type DateOrder, dateOrdersOf, isoDate, plainDate } from "./date-form.js";
import { decimalSignOf, isNegative, writtenNumber } from "./number-form.js";
import type { ReadOptions } from "./read-options.js";
import { ambiguousDate, decimalSignUnclear, mixedDates } from "./refusals.js";

/** Cells of one column as text; null where nothing stands. */
export interface TextColumn {
  readonly name: string;
  readonly cells: readonly (string | null)[];
}

/** Columns with numbers and dates read, and what was found out on the way. */
export interface TypedColumns {
  readonly columns: readonly Column[];
  readonly found: readonly string[];
}

/** A column with this share of written numbers is one of numbers, and its other cells are what is wrong with it. */
const mostly = 0.8;

/**
 * Reads the numbers and dates of text columns. In a column of numbers a cell that writes none stays the text it
 * is, so that whoever needs a number there can be told its row.
 *
 * @throws {ModelError} `decimal-sign-unclear` | `ambiguous-date` | `mixed-dates`: what cannot be told is asked.
 */
export function typedColumns(
  texts: readonly TextColumn[],
  delimiter: string,
  options: ReadOptions,
): TypedColumns {
  const numbers = texts.filter(({ cells }) => isOfNumbers(cells));
  const decimal = options.decimal ?? decimalOf(numbers, delimiter);
  const found: string[] = [];
  if (decimal === ",") found.push("Numbers are read with a decimal comma.");
  const columns = texts.map((text): Column => {
    if (numbers.includes(text)) return numbersOf(text, decimal, found);
    return options.dates === "text" ? text.cells : (datesOf(text, options.dates, found) ?? text.cells);
  });
  return { columns, found };
}

/** Codes with leading zeros or too many digits make a column one of codes, whatever else stands in it. */
function isOfNumbers(cells: readonly (string | null)[]): boolean {
  let [numbers, others] = [0, 0];
  for (const cell of cells) {
    if (cell === null || cell.trim() === "") continue;
    if (decimalSignOf(cell) !== undefined) numbers++;
    else if (/^\d+$/.test(cell.trim())) return false;
    else others++;
  }
  return numbers > 0 && numbers >= mostly * (numbers + others);
}

function allOf(cells: readonly (string | null)[], holds: (cell: string) => boolean): boolean {
  const written = cells.filter((cell): cell is string => cell !== null && cell.trim() !== "");
  return written.length > 0 && written.every(holds);
}

/** The one decimal sign that the number columns of a file use. */
function decimalOf(columns: readonly TextColumn[], delimiter: string): "." | "," {
  let settled: "." | "," | undefined;
  let unclear: SignedCell | undefined;
  for (const signed of signedCells(columns)) {
    if (signed.sign === "either") unclear ??= signed;
    else if (settled === undefined) settled = signed.sign;
    else if (signed.sign !== settled) throw decimalSignUnclear(signed.row, signed.name, signed.cell);
  }
  // Where cells are separated by commas the writer's decimal sign is the point: a decimal comma would need
  // every number quoted. (Common practice of spreadsheet programs, no source.)
  if (settled !== undefined || unclear === undefined || delimiter === ",") return settled ?? ".";
  throw decimalSignUnclear(unclear.row, unclear.name, unclear.cell);
}

interface SignedCell {
  readonly row: number;
  readonly name: string;
  readonly cell: string;
  readonly sign: "." | "," | "either";
}

/** The cells of number columns that hold a comma or a point. */
function* signedCells(columns: readonly TextColumn[]): Generator<SignedCell> {
  for (const { name, cells } of columns) {
    for (let i = 0; i < cells.length; i++) {
      const cell = cells[i] ?? "";
      const sign = decimalSignOf(cell);
      if (sign !== undefined && sign !== "none") yield { row: i + 1, name, cell, sign };
    }
  }
}

function numbersOf(text: TextColumn, decimal: "." | ",", found: string[]): Column {
  let credits = 0;
  const bad: number[] = [];
  const cells = text.cells.map((cell, i) => {
    if (cell === null || cell.trim() === "") return null;
    const value = writtenNumber(cell, decimal);
    if (value === undefined) bad.push(i);
    else if (value < 0 && !/^[-\u2212]/.test(cell.trim()) && isNegative(cell)) credits++;
    return value ?? cell;
  });
  if (credits > 0)
    found.push(
      `In "${text.name}" ${credits} amounts in brackets or with a minus behind are read as negative.`,
    );
  if (bad.length > 0) found.push(notNumbers(text, bad));
  return packed(cells);
}

function notNumbers({ name, cells }: TextColumn, bad: readonly number[]): string {
  const [first] = bad;
  const more = bad.length > 1 ? ` and ${bad.length - 1} more` : "";
  return `"${name}" is a column of numbers, but row ${first! + 1} holds "${cells[first!]}"${more}: kept as text.`;
}

function datesOf(
  text: TextColumn,
  asked: DateOrder | undefined,
  found: string[],
): readonly (string | null)[] | undefined {
  if (allOf(text.cells, (cell) => plainDate(cell) !== undefined))
    return text.cells.map((cell) => (cell === null ? null : (plainDate(cell) ?? null)));
  if (!allOf(text.cells, (cell) => dateOrdersOf(cell) !== undefined)) return undefined;
  const order = asked ?? orderOf(text);
  found.push(`Dates of "${text.name}" are read as ${order}.`);
  return text.cells.map((cell, i) => {
    if (cell === null || cell.trim() === "") return null;
    const iso = isoDate(cell, order);
    if (iso === undefined) throw mixedDates(i + 1, text.name, cell, order);
    return iso;
  });
}

/** The order that every cell can have; a cell that can have only one settles it. */
function orderOf({ name, cells }: TextColumn): DateOrder {
  let settled: DateOrder | undefined;
  for (let i = 0; i < cells.length; i++) {
    const orders = dateOrdersOf(cells[i] ?? "");
    if (orders?.length !== 1) continue;
    if (settled !== undefined && orders[0] !== settled) throw mixedDates(i + 1, name, cells[i]!, settled);
    settled = orders[0];
  }
  if (settled !== undefined) return settled;
  const first = cells.findIndex((cell) => cell !== null && cell.trim() !== "");
  throw ambiguousDate(first + 1, name, cells[first]!);
}
