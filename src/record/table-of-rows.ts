import type { ColumnTable } from "./column-table.js";
import { packed } from "./packed.js";

/**
 * A table of row objects. A row that lacks a key has a missing value there, and the order of keys within a row
 * does not matter; columns stand in the order in which their names first appear.
 */
export function tableOfRows(rows: readonly object[]): ColumnTable {
  const columns = new Map<string, unknown[]>();
  for (const row of rows) for (const name of Object.keys(row)) if (!columns.has(name)) columns.set(name, []);
  for (const [name, column] of columns) {
    for (const row of rows)
      column.push(Object.hasOwn(row, name) ? (row as Record<string, unknown>)[name] : null);
  }
  return { names: [...columns.keys()], columns: [...columns.values()].map(packed) };
}
