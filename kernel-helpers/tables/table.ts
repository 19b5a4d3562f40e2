import { frozenCopy } from "../../src/numeric/index.js";
import { checkCall } from "../options/index.js";
import { type NumberFormat, numberFormat } from "../wording/index.js";
import { columnRepeated, noColumns } from "./refusals.js";
import { showing } from "./show-itself.js";
import { tableHtml } from "./table-html.js";
import { tableText } from "./table-text.js";

/** How a column's values are written; see `Column`. */
export type ColumnKind = "text" | "integer" | "number" | "estimate" | "money" | "percent" | "probability";

/**
 * One column. Kinds, and how each writes a number:
 * `integer` whole; `number` to `digits` significant digits (default 4); `estimate` to the decimal at which the
 * standard error under `pairedWith` has its second digit (the standard error's own column may leave it out);
 * `money` to the minor unit, whole minor units when the value is a bigint; `percent` a share, times 100, to
 * `digits` decimals (default 1); `probability` to the first digit of its Monte-Carlo error under `pairedWith`,
 * else to `digits` decimals (default 3). A text in any of them ("not determined") is shown as that text.
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
  /** Key of the standard error (estimate) or Monte-Carlo error (probability) that says how many digits count. */
  readonly pairedWith?: string;
}

/** What stands below a table: a sentence, with a mark at a heading or a cell when `column` (and `row`) name one. */
export interface Footnote {
  /** What the note says. */
  readonly text: string;
  /** Column that the note is about. */
  readonly column?: string;
  /** Row that it is about, 0 for the first; default the column's heading. */
  readonly row?: number;
}

/** A table as data: what it says, not how it looks. */
export interface Table {
  readonly kind: "table";
  readonly title: string;
  readonly columns: readonly Column[];
  readonly rows: readonly Readonly<Record<string, unknown>>[];
  /** Rows set apart at the foot: sums, means. */
  readonly totals: readonly Readonly<Record<string, unknown>>[];
  readonly notes: readonly (string | Footnote)[];
  /** At most so many rows are shown; the count of the others is said. */
  readonly limit: number;
  readonly format: NumberFormat;
}

/** What `table` takes. */
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
 * Makes a table that shows itself: HTML for a notebook or page, lined-up text for a terminal.
 *
 * Every text is escaped. An absent value is an en dash, and a note says so.
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

/** Any object can be read by key; what it lacks is an absent value. */
type Row = Readonly<Record<string, unknown>>;

function checkColumns(columns: readonly Column[], title: string): void {
  if (columns.length === 0) throw noColumns(title);
  const seen = new Set<string>();
  for (const { key } of columns) {
    if (seen.has(key)) throw columnRepeated(key, title);
    seen.add(key);
  }
}
