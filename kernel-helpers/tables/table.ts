import { frozenCopy } from "../../src/numeric/index.js";
import { checkCall } from "../options/index.js";
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
  /** Where rows hold the value. */
  readonly key: string;
  /** Heading of the column. */
  readonly label: string;
  /** Unit, written behind the label in brackets; default "" (none). */
  readonly unit?: string;
  /** How a value is written. */
  readonly kind: ColumnKind;
  /**
   * Significant digits of a number, or decimals of a percentage or probability; default as the kind has it.
   */
  readonly digits?: number;
  /** Whether digits are set apart in thousands; false for a year; default true. */
  readonly grouped?: boolean;
  /**
   * Key of the standard error (estimate) or Monte-Carlo error (probability) that says how many digits count.
   */
  readonly pairedWith?: string;
}

/** A note below a table, with a mark at a heading or cell when `column` (and `row`) are given. */
export interface Footnote {
  /** What the note says. */
  readonly text: string;
  /** Column that the note is about. */
  readonly column?: string;
  /** Row that it is about, 0 for the first; default the column's heading. */
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
  /** Title of the table. */
  readonly title: string;
  /** Columns from left to right. */
  readonly columns: readonly Column[];
  /** Rows: objects that hold a value under the key of each column. */
  readonly rows: readonly object[];
  /** Rows set apart at the foot: sums, means. */
  readonly totals?: readonly object[];
  /** What stands below the table. */
  readonly notes?: readonly (string | Footnote)[];
  /** At most so many rows are shown; the count of the others is said; default 40. */
  readonly limit?: number;
  /** How numbers are written; default the format in force (`numberFormat`). */
  readonly format?: Partial<NumberFormat>;
}

/**
 * Makes a table: HTML for a notebook or page, aligned text for a terminal.
 *
 * All texts are escaped. A missing value is shown as an en dash, with a note.
 *
 * @throws {ModelError} `no-columns` | `column-repeated`.
 * @example table({ title: "Levels", columns: [{ key: "n", label: "Week", kind: "integer" }], rows: [{ n: 1 }] });
 */
export function table(options: TableOptions): Table {
  checkCall("table", arguments);
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
