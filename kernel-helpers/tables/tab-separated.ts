import { checkCall } from "../options/index.js";
import { minorUnits } from "../wording/index.js";
import { headings } from "./laid-out.js";
import { oneLine } from "./plain-text.js";
import type { Column, Table } from "./table.js";

/**
 * A table as tab-separated text for a spreadsheet: every row, headings first, numbers at full precision with
 * the decimal sign of the table's format and no grouping; an absent value is an empty cell.
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
  return guarded(oneLine(value instanceof Date ? value.toISOString() : String(value)));
}

/** A spreadsheet would run a text that begins like a formula; an apostrophe keeps it a text. */
function guarded(text: string): string {
  return /^[=+@-]/.test(text) && Number.isNaN(Number(text)) ? `'${text}` : text;
}
