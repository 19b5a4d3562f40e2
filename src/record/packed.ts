import type { Column } from "./column-table.js";

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
