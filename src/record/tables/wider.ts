import { type Column, type ColumnTable, columnNamed, isEmpty, rowCount } from "../column-table.js";
import { decided } from "../decisions/correct.js";
import { packed } from "../packed.js";
import { twoCells } from "./refusals.js";

/** How a long table becomes a wide one. */
export interface WiderOptions {
  /** Columns that stay, such as the period. */
  readonly keep: string | readonly string[];
  /** Column whose cells become column names. */
  readonly names: string;
  /** Column whose cells fill them. */
  readonly values: string;
}

/** How a wide table becomes a long one. */
export interface LongerOptions {
  /** Columns that stay; every other one becomes rows. */
  readonly keep: string | readonly string[];
  /** Name of the new column of names. */
  readonly names: string;
  /** Name of the new column of values. */
  readonly values: string;
}

const list = (names: string | readonly string[]): readonly string[] =>
  typeof names === "string" ? [names] : names;

/**
 * One row a period, one column a series. Two values for one cell are refused; a cell without any is missing.
 *
 * @throws {ModelError} `missing-column` | `two-cells`.
 */
export function wider(record: ColumnTable, options: WiderOptions): ColumnTable {
  const table = decided(record);
  const keep = list(options.keep).map((name) => columnNamed(table, name, "a column to keep"));
  const names = columnNamed(table, options.names, "the names");
  const values = columnNamed(table, options.values, "the values");
  const lines = new Map<string, { readonly row: number; readonly cells: Map<string, number> }>();
  const heads = new Set<string>();
  for (let row = 0; row < rowCount(table); row++) {
    const key = JSON.stringify(keep.map((column) => String(column[row])));
    const line = lines.get(key) ?? { row, cells: new Map<string, number>() };
    lines.set(key, line);
    const head = String(names[row]);
    const before = line.cells.get(head);
    if (before !== undefined) throw twoCells(before + 1, row + 1, head);
    line.cells.set(head, row);
    heads.add(head);
  }
  const rows = [...lines.values()];
  const kept = keep.map((column) => packed(rows.map(({ row }) => column[row])));
  const wide = [...heads].map((head) => packed(rows.map(({ cells }) => cellAt(values, cells.get(head)))));
  return { names: [...list(options.keep), ...heads], columns: [...kept, ...wide] };
}

function cellAt(column: Column, row: number | undefined): unknown {
  return row === undefined || isEmpty(column[row]) ? null : column[row];
}

/**
 * One row a series and period, from one column a series. Empty cells become rows with a missing value.
 *
 * @throws {ModelError} `missing-column`.
 */
export function longer(record: ColumnTable, options: LongerOptions): ColumnTable {
  const table = decided(record);
  const kept = list(options.keep);
  const keep = kept.map((name) => columnNamed(table, name, "a column to keep"));
  const turned = table.names
    .map((name, at) => ({ name, column: table.columns[at]! }))
    .filter(({ name }) => !kept.includes(name));
  const rows = rowCount(table);
  const places = Array.from({ length: rows }, (_, row) => turned.map((_, at) => ({ row, at }))).flat();
  return {
    names: [...kept, options.names, options.values],
    columns: [
      ...keep.map((column) => packed(places.map(({ row }) => column[row]))),
      places.map(({ at }) => turned[at]!.name),
      packed(places.map(({ row, at }) => cellAt(turned[at]!.column, row))),
    ],
  };
}
