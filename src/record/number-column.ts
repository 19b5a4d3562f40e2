import type { Column } from "./column-table.js";
import { isEmpty } from "./column-table.js";
import { decimalSignUnclear, notANumber } from "./refusals.js";

const plainNumber = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const withSeparators = /^[+-]?\d+([.,' \u00a0\u202f]\d+)+$/;
const withLimitSign = /^([<>])\s*([+-]?[\d.]+(e[+-]?\d+)?)$/i;

/** Values below or above a limit, told by a sign in the cell: -1 for "<0.05", 1 for ">3.5", 0 for a value. */
export interface NumberColumn {
  /** NaN where the cell is empty. */
  readonly values: Float64Array;
  readonly censoring: Int8Array | undefined;
}

/**
 * The numbers of a column. An empty cell is NaN, never zero; any other text is refused with its place.
 *
 * @param signs - when true, "<0.05" and ">3.5" are read as limits; otherwise they are refused with that remedy.
 * @param isRead - whether a row is read; what the others hold is of no concern, and they are NaN.
 * @throws {ModelError} `not-a-number` | `decimal-sign-unclear`.
 */
export function numberColumn(
  column: Column,
  name: string,
  signs = false,
  isRead: (row: number) => boolean = () => true,
): NumberColumn {
  if (column instanceof Float64Array) return { values: refuseInfinite(column, name), censoring: undefined };
  const values = new Float64Array(column.length).fill(Number.NaN);
  const sides = signs ? column.map(sideOfLimit) : [];
  for (let i = 0; i < column.length; i++) {
    if (!isRead(i)) continue;
    const cell = column[i];
    const read = numberOf(sides[i] ? String(cell).trim().slice(1) : cell);
    if (read === undefined) throw refusalOf(column, i, name, isRead);
    values[i] = read;
  }
  return { values, censoring: sides.some((side) => side !== 0) ? Int8Array.from(sides) : undefined };
}

function sideOfLimit(cell: unknown): number {
  if (typeof cell !== "string" || !withLimitSign.test(cell.trim())) return 0;
  return cell.trim().startsWith("<") ? -1 : 1;
}

/** NaN of an empty cell; undefined of what is no number. */
function numberOf(cell: unknown): number | undefined {
  if (typeof cell === "number" && Number.isFinite(cell)) return cell;
  if (isEmpty(cell)) return Number.NaN;
  if (typeof cell === "bigint") return Number(cell);
  if (typeof cell === "boolean") return cell ? 1 : 0;
  return typeof cell === "string" && plainNumber.test(cell.trim()) ? Number(cell) : undefined;
}

/** Of a column with unread cells the one to name: a cell that is no number by any decimal sign goes before others. */
function refusalOf(
  column: readonly unknown[],
  first: number,
  name: string,
  isRead: (row: number) => boolean,
): Error {
  const separated = (cell: unknown): boolean => typeof cell === "string" && withSeparators.test(cell.trim());
  const bad = column.findIndex(
    (cell, row) => isRead(row) && numberOf(cell) === undefined && !separated(cell),
  );
  if (bad >= 0) return notANumber(bad + 1, name, column[bad], remedyFor(column[bad]));
  return decimalSignUnclear(first + 1, name, String(column[first]));
}

function refuseInfinite(values: Float64Array, name: string): Float64Array {
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (value === Number.POSITIVE_INFINITY || value === Number.NEGATIVE_INFINITY)
      throw notANumber(i + 1, name, value, remedyFor(value));
  }
  return values;
}

function remedyFor(cell: unknown): string {
  if (typeof cell === "number") return "Correct the cell, or leave it empty if the value is missing.";
  if (typeof cell === "string" && withLimitSign.test(cell.trim()))
    return 'If it means a value beyond a limit, say censored: "signs".';
  return `If it marks a missing value, read the file with missing: [${JSON.stringify(String(cell))}]; otherwise correct the cell.`;
}
