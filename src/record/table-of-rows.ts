import type { Column, ColumnTable } from "./column-table.js";

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

/** A column of numbers and empty cells as numbers with NaN where a cell is empty; any other as it is. */
export function packed(cells: readonly unknown[]): Column {
  const values = new Float64Array(cells.length);
  for (let i = 0; i < cells.length; i++) {
    const cell = cells[i];
    if (typeof cell === "number" || isSafeWhole(cell)) values[i] = Number(cell);
    else if (cell === null || cell === undefined) values[i] = Number.NaN;
    else return cells;
  }
  return values;
}

/** A whole number written as a bigint that a double keeps. */
function isSafeWhole(cell: unknown): boolean {
  return typeof cell === "bigint" && Number.isSafeInteger(Number(cell));
}
