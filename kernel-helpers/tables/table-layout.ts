import { formatDigits, superscript } from "../wording/index.js";
import { cellText, missingMark } from "./cell-text.js";
import { commonDecimals } from "./common-decimals.js";
import type { Column, Footnote, Table } from "./table.js";

/** One formatted cell: text, footnote letter, and whether it is a number. */
export interface Cell {
  readonly text: string;
  readonly mark: string;
  readonly numeric: boolean;
}

/** A table with all texts formatted; HTML and plain text differ only in how they draw it. */
export interface TableLayout {
  readonly headings: readonly Cell[];
  readonly rows: readonly (readonly Cell[])[];
  readonly totals: readonly (readonly Cell[])[];
  /** Number of shown rows before the omitted ones; undefined when all are shown. */
  readonly truncatedAfter: number | undefined;
  readonly notes: readonly { readonly mark: string; readonly text: string }[];
}

/** Formats a table: rows within its limit, texts, footnote letters and notes. */
export function tableLayout(table: Table): TableLayout {
  const { columns, rows, totals, limit, format } = table;
  const cut = rows.length > limit;
  const head = cut ? Math.ceil(limit * 0.75) : rows.length;
  const tail = cut ? limit - head : 0;
  const places = [...Array(head).keys(), ...Array.from({ length: tail }, (_, i) => rows.length - tail + i)];
  const marks = footnoteMarks(table.notes);
  const shown = [...places.map((place) => rows[place] ?? {}), ...totals];
  const decimals = columns.map((column) => columnDecimals(column, shown));
  const texts = shown.map((row) =>
    columns.map((column, j) =>
      totals.includes(row) && row[column.key] === undefined ? "" : cellText(column, row, format, decimals[j]),
    ),
  );
  alignFractions(texts, columns, format.decimal);
  const cells = texts.map((line, at) =>
    line.map((text, j) => ({
      text,
      mark: at < places.length ? marks.at(columns[j]?.key, places[at]) : "",
      numeric: columns[j]?.kind !== "text",
    })),
  );
  const notes = [...marks.notes];
  if (texts.some((line) => line.includes(missingMark))) notes.push({ mark: missingMark, text: "no value" });
  if (cut) notes.push({ mark: "", text: truncationNote(head, tail, rows.length, table) });
  return {
    headings: headings(table)
      .map((text, j) => ({ column: columns[j] as Column, text }))
      .map(({ column, text }) => ({
        text,
        mark: marks.at(column.key, undefined),
        numeric: column.kind !== "text",
      })),
    rows: cells.slice(0, places.length),
    totals: cells.slice(places.length),
    truncatedAfter: cut ? head : undefined,
    notes,
  };
}

function columnDecimals(
  column: Column,
  rows: readonly Readonly<Record<string, unknown>>[],
): number | undefined {
  if (column.kind !== "number") return undefined;
  const values = rows.map((row) => row[column.key]).filter((value) => typeof value === "number");
  return commonDecimals(values, column.digits ?? 4);
}

/**
 * The headings of a table: label with unit, "Density (10⁴ cells/mL)"; a money column without a unit gets the currency of
 * the number format. "to" after "Interval, from" becomes "Interval, to", because a heading is also read alone.
 */
export function headings({ columns, format }: Table): string[] {
  return columns.map((column, j) => {
    const before = columns[j - 1]?.label ?? "";
    const ends = column.label === "to" && before.endsWith(", from");
    const label = ends ? before.replace(/from$/, "to") : column.label;
    const unit = column.unit || (column.kind === "money" ? format.currency : "");
    return unit === "" ? label : `${label} (${superscript(unit)})`;
  });
}

function truncationNote(head: number, tail: number, all: number, { format }: Table): string {
  const count = (n: number): string => formatDigits(String(n), format);
  const last = tail > 0 ? ` and ${count(all - tail + 1)} to ${count(all)}` : "";
  return `Rows 1 to ${count(head)}${last} of ${count(all)} are shown.`;
}

function footnoteMarks(notes: Table["notes"]): {
  at: (column: string | undefined, row: number | undefined) => string;
  notes: { mark: string; text: string }[];
} {
  const placed = notes.filter(
    (note): note is Footnote => typeof note !== "string" && note.column !== undefined,
  );
  const letter = (note: Footnote): string => String.fromCharCode(97 + (placed.indexOf(note) % 26));
  return {
    at: (column, row) =>
      placed
        .filter((note) => note.column === column && note.row === row)
        .map(letter)
        .join(","),
    notes: notes.map((note) => {
      if (typeof note === "string") return { mark: "", text: superscript(note) };
      return { mark: placed.includes(note) ? letter(note) : "", text: superscript(note.text) };
    }),
  };
}

/**
 * Pads numbers on the right, so that decimal signs are aligned in a right-aligned column. Estimates are not padded: such
 * a column has parameters of different sizes.
 */
function alignFractions(texts: string[][], columns: readonly Column[], decimal: string): void {
  columns.forEach((column, j) => {
    if (column.kind === "text" || column.kind === "estimate") return;
    const widths = texts.map((line) => fractionWidth(line[j] ?? "", decimal));
    const widest = Math.max(0, ...widths.filter((width) => width !== undefined));
    texts.forEach((line, i) => {
      const width = widths[i];
      if (width !== undefined && width < widest) line[j] = (line[j] ?? "") + padding(width, widest);
    });
  });
}

// A figure space is as wide as a digit, a punctuation space as the decimal sign.
function padding(width: number, widest: number): string {
  return width === 0 ? `\u2008${"\u2007".repeat(widest - 1)}` : "\u2007".repeat(widest - width);
}

/** Characters from the decimal sign on; undefined for anything but a plain number. */
function fractionWidth(text: string, decimal: string): number | undefined {
  if (!/^[-<>]?\d[\d.,'\u00a0\u2009\u202f ]*%?$/.test(text)) return undefined;
  const at = text.lastIndexOf(decimal);
  return at < 0 ? 0 : text.replace("%", "").length - at;
}
