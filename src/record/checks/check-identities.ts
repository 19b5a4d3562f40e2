import { type ColumnTable, columnNamed } from "../column-table.js";
import type { FindingLog } from "../finding-log.js";
import { numberColumn } from "../number-column.js";
import { type Identity, identityOf, type SumTerm } from "./sum-text.js";

/** Decimals beyond these are noise of binary fractions, not digits of a record. */
const mostDecimals = 6;

/**
 * Finds every row in which a sum does not foot, and by how much; the difference is never spread.
 *
 * @param series - rows of each series, 0-based and by increasing period.
 * @throws {ModelError} `identity-unread` | `not-a-number`.
 */
export function checkIdentities(
  table: ColumnTable,
  texts: readonly string[],
  series: readonly Int32Array[],
  log: FindingLog,
): void {
  for (const text of texts) {
    const identity = identityOf(text, table.names);
    const columns = new Map<string, Float64Array>();
    for (const name of [identity.column, ...identity.sum.flatMap(({ column }) => column ?? [])])
      if (!columns.has(name))
        columns.set(name, numberColumn(columnNamed(table, name, "a part of a sum"), name).values);
    const decimals = decimalsOf([...columns.values()]);
    for (const rows of series) checkRows(identity, columns, rows, decimals, log);
  }
}

function checkRows(
  identity: Identity,
  columns: ReadonlyMap<string, Float64Array>,
  rows: Int32Array,
  decimals: number,
  log: FindingLog,
): void {
  const reachesBack = identity.sum.some(({ back }) => back === 1);
  for (let i = reachesBack ? 1 : 0; i < rows.length; i++) {
    const row = rows[i]!;
    const value = columns.get(identity.column)![row]!;
    const expected = identity.sum.reduce((sum, term) => sum + termValue(term, columns, rows, i), 0);
    const difference = value - expected;
    // Half a unit of the last decimal that the record writes: less is the rounding of binary fractions.
    if (Number.isNaN(difference) || Math.abs(difference) < 0.5 * 10 ** -decimals) continue;
    noteUnfooted(identity, row, value, expected, decimals, log);
  }
}

function termValue(
  { sign, column, number, back }: SumTerm,
  columns: ReadonlyMap<string, Float64Array>,
  rows: Int32Array,
  i: number,
): number {
  return sign * (column === undefined ? number : columns.get(column)![rows[i - back]!]!);
}

function noteUnfooted(
  { column, text }: Identity,
  row: number,
  value: number,
  expected: number,
  decimals: number,
  log: FindingLog,
): void {
  const written = (number: number): string => number.toFixed(decimals);
  log.note({
    kind: "does-not-foot",
    row: row + 1,
    column,
    value: written(value),
    message: `Row ${row + 1}: ${column} ${written(value)}, expected ${written(expected)}; difference ${written(value - expected)} unexplained (${text}).`,
    done: "kept; totals are open until it is classified",
  });
}

/** Most decimals that any value is written with. */
function decimalsOf(columns: readonly Float64Array[]): number {
  let most = 0;
  for (const column of columns) {
    for (const value of column) {
      while (
        most < mostDecimals &&
        Math.abs(value * 10 ** most - Math.round(value * 10 ** most)) > 1e-6 * Math.max(1, Math.abs(value))
      )
        most++;
    }
  }
  return most;
}
