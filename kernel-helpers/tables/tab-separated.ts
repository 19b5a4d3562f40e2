import { checkCall } from "../options/index.js";
import { minorUnits } from "../wording/index.js";
import { oneLine } from "./plain-text.js";
import type { Column, Table } from "./table.js";
import { headings } from "./table-layout.js";

/**
 * A table as tab-separated text for a spreadsheet: headings and all rows, numbers at full precision with the decimal sign
 * of the table and without grouping; a missing value is an empty cell.
 *
 * @example tabSeparated(table({ title: "", columns: [{ key: "n", label: "Week", kind: "integer" }], rows: [{ n: 1 }] }));
 */
export function tabSeparated(table: Table): string {
  checkCall("tabSeparated", arguments);
  const head = headings(table).map(oneLine);
  const lines = [...table.rows, ...table.totals].map((row) =>
    table.columns.map((column) => plain(row[column.key], column, table)),
  );
  return [head, ...lines].map((line) => line.join("\t")).join("\n");
}

function plain(value: unknown, column: Column, { format }: Table): string {
  if (value === undefined || value === null || Number.isNaN(value)) return "";
  if (typeof value === "bigint" && column.kind === "money") {
    return minorUnits(value, column.digits ?? format.minorDigits).replace(".", format.decimal);
  }
  if (typeof value === "number" || typeof value === "bigint")
    return String(value).replace(".", format.decimal);
  return escapeFormula(oneLine(value instanceof Date ? value.toISOString() : String(value)));
}

/** A spreadsheet would evaluate a text that starts like a formula; an apostrophe keeps it text. */
function escapeFormula(text: string): string {
  return /^[=+@-]/.test(text) && Number.isNaN(Number(text)) ? `'${text}` : text;
}
