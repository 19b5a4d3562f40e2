import { frozenCopy } from "../../src/numeric/index.js";
import { type NumberFormat, numberFormat } from "../wording/index.js";
import { duplicateColumnError, noColumnsError, unknownColumnKindError } from "./errors.js";
import { showing } from "./show-itself.js";
import { tableHtml } from "./table-html.js";
import { tableText } from "./table-text.js";

const kinds = ["text", "integer", "number", "estimate", "money", "percent", "probability"] as const;

/** How the values of a column are written; see `Column`. */
export type ColumnKind = (typeof kinds)[number];

/**
 * One column. Its kind decides how numbers are written: `integer` whole; `number` to `digits` significant digits (default
 * 4); `estimate` to the second digit of the standard error in the column `pairedWith` (not needed for the standard error
 * itself); `money` to the minor unit, where a bigint counts minor units; `percent` a share times 100, to `digits`
 * decimals (default 1); `probability` to the first digit of its Monte Carlo error in `pairedWith`, otherwise to `digits`
 * decimals (default 3). A text in a column of any kind ("not determined") is shown as it is.
 */
export interface Column {
  /** Property of the rows that has the value. */
  readonly key: string;
  readonly label: string;
  /** Unit, written in brackets after the label; "" or absent = none. */
  readonly unit?: string;
  readonly kind: ColumnKind;
  readonly digits?: number;
  /** Whether thousands are separated; false for years. Default true. */
  readonly grouped?: boolean;
  /** Key of the standard error (estimate) or Monte Carlo error (probability) that decides the number of digits. */
  readonly pairedWith?: string;
}

/** A note below a table, with a mark at a heading or cell when `column` (and `row`) are given. */
export interface Footnote {
  readonly text: string;
  readonly column?: string;
  /** Index of the row, from 0; without it the mark is at the heading. */
  readonly row?: number;
}

/** A table as data: its content, not its style. */
export interface Table {
  readonly kind: "table";
  readonly title: string;
  readonly columns: readonly Column[];
  readonly rows: readonly Readonly<Record<string, unknown>>[];
  /** Rows at the foot: sums, means. */
  readonly totals: readonly Readonly<Record<string, unknown>>[];
  readonly notes: readonly (string | Footnote)[];
  /** Maximum number of rows shown; a note gives the number of all rows. */
  readonly limit: number;
  readonly format: NumberFormat;
}

/** Options of `table`. */
export interface TableOptions {
  readonly title: string;
  readonly columns: readonly Column[];
  readonly rows: readonly object[];
  readonly totals?: readonly object[];
  readonly notes?: readonly (string | Footnote)[];
  /** Maximum number of rows shown. Default 40. */
  readonly limit?: number;
  /** Default: the current number format (`numberFormat`). */
  readonly format?: Partial<NumberFormat>;
}

/**
 * Makes a table: HTML for a notebook or page, aligned text for a terminal.
 *
 * All texts are escaped. A missing value is shown as an en dash, with a note.
 *
 * @throws {ModelError} `no-columns` | `column-repeated` | `unknown-column-kind`.
 * @example table({ title: "Levels", columns: [{ key: "n", label: "Week", kind: "integer" }], rows: [{ n: 1 }] });
 */
export function table(options: TableOptions): Table {
  checkColumns(options.columns, options.title);
  // Copies: the caller's rows must not be frozen, nor change the table later.
  const { title, columns, rows, totals = [], notes = [], limit = 40, format } = frozenCopy(options);
  const made: Table = {
    kind: "table",
    title,
    columns,
    rows: rows as readonly Row[],
    totals: totals as readonly Row[],
    notes,
    limit: Math.max(1, limit),
    format: { ...numberFormat(), ...format },
  };
  return showing(made, () => ({ "text/html": tableHtml(made), "text/plain": tableText(made) }));
}

/** Any object can be a row; a property it lacks is a missing value. */
type Row = Readonly<Record<string, unknown>>;

function checkColumns(columns: readonly Column[], title: string): void {
  if (columns.length === 0) throw noColumnsError(title);
  const seen = new Set<string>();
  for (const { key, kind } of columns) {
    if (seen.has(key)) throw duplicateColumnError(key, title);
    if (!kinds.includes(kind)) throw unknownColumnKindError(kind, key, kinds);
    seen.add(key);
  }
}
