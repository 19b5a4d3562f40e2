import { ModelError } from "../numeric/index.js";

const quote = (names: readonly string[]): string => names.map((name) => `"${visible(name)}"`).join(", ");

/** A name with its invisible characters written out: "catch\u200brate". */
function visible(name: string): string {
  return name.replace(
    /[\p{Cc}\p{Cf}\u00a0]/gu,
    (sign) => `\\u${sign.codePointAt(0)!.toString(16).padStart(4, "0")}`,
  );
}

/** At most twelve names, then how many more. */
export function listed(names: readonly string[]): string {
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
  const hint =
    nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${visible(n)}"`).join(" or ")}?` : "";
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

export function optionUnknown(
  option: string,
  known: readonly string[],
  nearest: readonly string[],
): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${n}"`).join(" or ")}?` : "";
  return new ModelError(
    "option-unknown",
    `There is no option "${option}". There are ${known.join(", ")}.${hint}`,
    {
      option,
      known,
      nearest,
    },
  );
}

export function notObservations(given: string): ModelError {
  return new ModelError(
    "not-observations",
    `Differences are taken of observations; this is ${given}. Make them first: ` +
      'observations(record, { period: "week", step: "week", value: "stock" }).',
    { given },
  );
}

export function noRowsChosen(
  where: Readonly<Record<string, unknown>>,
  range: object,
  cellsOf: (name: string) => readonly string[],
): ModelError {
  const held = Object.keys(where).map((name) => `"${name}" holds ${listed(cellsOf(name))}`);
  const asked = `where: ${JSON.stringify(where)}${Object.keys(range).length === 0 ? "" : `, rows: ${JSON.stringify(range)}`}`;
  return new ModelError(
    "no-rows-chosen",
    `No row of the record meets ${asked}.${held.length === 0 ? "" : ` ${held.join("; ")}.`}`,
    { where, range },
  );
}

export function conditionWrong(column: string, condition: unknown, ends: string): ModelError {
  return new ModelError(
    "option-wrong",
    `Option \`where\`: ${JSON.stringify(condition)} is no condition on "${column}". Write a cell, several cells in [ ], ` +
      `{ not: ... }, or { from: ..., until: ... } with ${ends}.`,
    { column, condition },
  );
}

export function columnNotUsed(
  option: string,
  name: string,
  known: readonly string[],
  nearest: readonly string[],
): ModelError {
  const hint = nearest.length > 0 ? ` Did you mean ${nearest.map((n) => `"${n}"`).join(" or ")}?` : "";
  return new ModelError(
    "option-wrong",
    `Option \`${option}\`: "${name}" is neither a value nor an input of these observations. They have ${listed(known)}.${hint}`,
    { option, name, known, nearest },
  );
}

export function levelsAddedUp(column: string): ModelError {
  return new ModelError(
    "option-wrong",
    `Option \`duplicates\`: "sum" would add up "${column}", which is measured as a level. Write duplicates: "last" (or "first", "average"): ` +
      "columns measured as flows are added up all the same.",
    { column },
  );
}
