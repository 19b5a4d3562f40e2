import { ModelError } from "../numeric/index.js";

const quote = (names: readonly string[]): string => names.map((name) => `"${name}"`).join(", ");

/** At most twelve names, then how many more. */
function listed(names: readonly string[]): string {
  const shown = names.slice(0, 12);
  const more = names.length - shown.length;
  return more > 0 ? `${quote(shown)} and ${more} more` : quote(shown);
}

/** A cell as it is shown in a message: its text, shortened, in double quotes. */
export function shown(cell: unknown): string {
  const text = String(cell);
  return `"${text.length > 40 ? `${text.slice(0, 40)}...` : text}"`;
}

export function missingColumn(
  name: string,
  askedFor: string,
  names: readonly string[],
  nearest: readonly string[],
): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${n}"`).join(" or ")}?` : "";
  return new ModelError(
    "missing-column",
    `The record has no column "${name}", asked for as ${askedFor}. Its columns are ${listed(names)}.${hint}`,
    { name, askedFor, names, nearest },
  );
}

export function doubledColumn(name: string, askedFor: string): ModelError {
  return new ModelError(
    "doubled-column",
    `Two columns are named "${name}", asked for as ${askedFor}. Rename one of them in the record.`,
    { name, askedFor },
  );
}

export function unevenColumns(names: readonly string[], lengths: readonly number[]): ModelError {
  const told = names.map((name, i) => `"${name}" has ${lengths[i]}`).join(", ");
  return new ModelError(
    "uneven-columns",
    `The columns differ in length: ${told} rows. Fill the shorter ones with null where a value is missing.`,
    { names, lengths },
  );
}

export function noDataRows(): ModelError {
  return new ModelError(
    "no-data-rows",
    "No data rows were found. Give a record with at least one row below its header.",
  );
}

export function noUsableRows(read: number): ModelError {
  return new ModelError(
    "no-usable-rows",
    `None of the ${read} rows can be used: every one was left out. The columns named may be empty or the wrong ones.`,
    { read },
  );
}

export function optionMissing(option: string, hint: string): ModelError {
  return new ModelError("option-missing", `The option "${option}" is missing. ${hint}`, { option });
}

export function optionWrong(option: string, value: unknown, expected: string): ModelError {
  return new ModelError(
    "option-wrong",
    `The option "${option}" is ${shown(typeof value === "object" ? JSON.stringify(value) : value)}; it must be ${expected}.`,
    { option, value },
  );
}

export function notANumber(row: number, column: string, cell: unknown, remedy: string): ModelError {
  return new ModelError("not-a-number", `Row ${row}, ${column}: ${shown(cell)} is not a number. ${remedy}`, {
    row,
    column,
    value: cell,
  });
}

export function decimalSignUnclear(row: number, column: string, cell: string): ModelError {
  return new ModelError(
    "decimal-sign-unclear",
    `Row ${row}, ${column}: ${shown(cell)} - decimal sign unclear; choose comma or point. ` +
      'Read the file with decimal: "," or decimal: ".".',
    { row, column, value: cell },
  );
}

export function noPeriod(row: number, column: string): ModelError {
  return new ModelError(
    "no-period",
    `Row ${row}, ${column}: the period is empty, so the row has no place in the record. ` +
      "Enter the period, or correct the row so that it is left out.",
    { row, column },
  );
}

export function notIncreasing(
  row: number,
  column: string,
  group: string,
  before: string,
  now: string,
): ModelError {
  const where = group === "" ? "" : ` of "${group}"`;
  return new ModelError(
    "not-increasing",
    `Times are not increasing at row ${row}${where}: ${column} ${now} follows ${before}. ` +
      'If several series are mixed, name the column that tells them apart with by. To put the rows in order, say disorder: "sort".',
    { row, column, group, before, now },
  );
}

export interface DuplicateFacts {
  readonly rows: readonly number[];
  readonly column: string;
  readonly group: string;
  readonly period: string;
  readonly values: readonly string[];
}

export function duplicatePeriod(facts: DuplicateFacts, more: number): ModelError {
  const { rows, column, group, period, values } = facts;
  const where = group === "" ? "" : ` in "${group}"`;
  const alike = new Set(values).size === 1 ? "the same value" : "different values";
  const others = more > 0 ? ` ${more} more like it.` : "";
  return new ModelError(
    "duplicate-period",
    `${column} ${period} appears ${rows.length} times${where}, at rows ${rows.join(" and ")}, with ${alike} (${values.join(", ")}).${others} ` +
      'Possible duplicate - keep both? Say duplicates: "average", "first", "last" or "sum", or name the replicates column.',
    { ...facts },
  );
}

export function offStep(row: number, column: string, value: string, steps: number, step: string): ModelError {
  return new ModelError(
    "off-step",
    `Row ${row}, ${column}: ${value} lies ${Number(steps.toPrecision(6))} steps of ${step} after the first row, ` +
      'not a whole number of steps. Choose a step that divides the periods, or say offStep: "nearest".',
    { row, column, value, steps },
  );
}

export function stepMissing(column: string, closest: string): ModelError {
  return new ModelError(
    "step-missing",
    `The length of one step is not stated, and no length is assumed. The closest rows lie ${closest} apart in "${column}": ` +
      'say for example step: { every: 1, of: "hour" } or step: "month-end".',
    { column, closest },
  );
}

export function ambiguousDate(row: number, column: string, cell: unknown): ModelError {
  return new ModelError(
    "ambiguous-date",
    `Row ${row}, ${column}: ${shown(cell)} - ambiguous date. Write dates as 2026-03-31, ` +
      'or read the file with dates: "day-month-year" or dates: "month-day-year".',
    { row, column, value: cell },
  );
}

export function noSuchPeriod(
  row: number,
  columns: readonly string[],
  year: number,
  number: number,
): ModelError {
  return new ModelError(
    "no-such-period",
    `Row ${row}, ${columns.join(", ")}: the year ${year} has no period ${number}. Correct the row, or choose the calendar that numbers it so.`,
    { row, columns, year, number },
  );
}

export function noLogarithm(row: number, column: string, value: number): ModelError {
  return new ModelError(
    "no-logarithm",
    `Row ${row}, ${column}: level ${value} has no logarithm; choose censored, count model, or exclude.`,
    { row, column, value },
  );
}

export function noPairs(
  plan: { readonly order: number; readonly lag: number; readonly seasonal: number | undefined },
  groups: readonly { readonly index: Int32Array }[],
): ModelError {
  const longest = groups.reduce((most, { index }) => Math.max(most, index.length), 0);
  const season = plan.seasonal === undefined ? "" : `, season ${plan.seasonal}`;
  return new ModelError(
    "no-pairs",
    `No difference of order ${plan.order}, lag ${plan.lag}${season} can be formed: the longest series has ${longest} rows, ` +
      "and each difference needs rows exactly that far apart. Choose a shorter lag, or a longer record.",
    { ...plan, longest },
  );
}

export function identityUnread(
  text: string,
  at: number,
  names: readonly string[],
  nearest: readonly string[],
): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${n}"`).join(" or ")}?` : "";
  return new ModelError(
    "identity-unread",
    `The sum could not be read.\n    ${text}\n    ${" ".repeat(Math.max(0, at))}^\n` +
      `It is one column, "=", and columns added and subtracted, such as closing = opening + interest - paid. Columns: ${listed(names)}.${hint}`,
    { text, at, names, nearest },
  );
}

export function mixedUnits(
  column: string,
  group: string,
  first: { readonly row: number; readonly unit: string },
  other: { readonly row: number; readonly unit: string },
): ModelError {
  const where = group === "" ? "The record" : `"${group}"`;
  return new ModelError(
    "mixed-units",
    `${where} mixes units: ${column} is "${first.unit}" at row ${first.row} and "${other.unit}" at row ${other.row}. ` +
      `Convert the values first, or keep them apart with by or where: { ${column}: ${JSON.stringify(first.unit)} }.`,
    { column, group, first, other },
  );
}
