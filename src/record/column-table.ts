import { nearestNames } from "../numeric/index.js";
import type { Decision } from "./decisions/decision.js";
import { packed } from "./packed.js";
import { doubledColumn, missingColumn, unevenColumns } from "./refusals.js";

/** One column of a record: any cells, or numbers with NaN where a cell is empty. */
export type Column = readonly unknown[] | Float64Array;

/** A record as columns of equal length, names in the record's order; names may repeat or be empty. */
export interface ColumnTable {
  readonly names: readonly string[];
  readonly columns: readonly Column[];
  /** Corrections that the analyst chose; the columns themselves are always as they were read. */
  readonly decisions?: readonly Decision[];
}

/** Number of rows; a table without columns has none. */
export function rowCount(table: ColumnTable): number {
  return table.columns[0]?.length ?? 0;
}

/**
 * The cells of a named column.
 *
 * @throws {ModelError} `missing-column`, naming the nearest columns; `doubled-column` when two have the name.
 */
export function columnNamed(table: ColumnTable, name: string, askedFor: string): Column {
  const at = table.names.indexOf(name);
  if (at < 0) throw missingColumn(name, askedFor, table.names, nearestNames(name, table.names));
  if (table.names.indexOf(name, at + 1) >= 0) throw doubledColumn(name, askedFor);
  return table.columns[at]!;
}

/**
 * The table with names free of spaces and invisible characters at their ends, such as a carriage return that a file
 * left there; a name that would then be another column's stays as it is.
 */
export function withPlainNames(table: ColumnTable): ColumnTable {
  const plain = table.names.map((name) => name.replace(endsUnseen, ""));
  if (plain.every((name, i) => name === table.names[i])) return table;
  const isOne = (name: string): boolean => plain.filter((other) => other === name).length === 1;
  return { ...table, names: plain.map((name, i) => (isOne(name) ? name : table.names[i]!)) };
}

const endsUnseen = /^[\s\p{Cc}\p{Cf}]+|[\s\p{Cc}\p{Cf}]+$/gu;

/**
 * A table from named columns, such as `{ month: [...], owed: [...] }`.
 *
 * @throws {ModelError} `uneven-columns` when their lengths differ.
 */
export function tableOf(columns: Readonly<Record<string, ArrayLike<unknown>>>): ColumnTable {
  const names = Object.keys(columns);
  const lengths = names.map((name) => columns[name]!.length);
  if (new Set(lengths).size > 1) throw unevenColumns(names, lengths);
  return {
    names,
    columns: names.map((name) => {
      const column = columns[name]!;
      return column instanceof Float64Array ? column : packed(Array.from(column));
    }),
  };
}

/** A cell that holds nothing: null, undefined, not a number, or only spaces. Nothing is not zero. */
export function isEmpty(cell: unknown): boolean {
  if (cell === null || cell === undefined) return true;
  if (typeof cell === "number") return Number.isNaN(cell);
  return typeof cell === "string" && cell.trim() === "";
}

/** Whether a value is a table of columns already. */
export function isColumnTable(value: object): value is ColumnTable {
  const { names, columns } = value as Partial<ColumnTable>;
  return (
    Array.isArray(names) &&
    Array.isArray(columns) &&
    names.length === columns.length &&
    columns.every((column) => Array.isArray(column) || column instanceof Float64Array)
  );
}
