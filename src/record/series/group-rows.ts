import { type Column, type ColumnTable, columnNamed, isEmpty } from "../column-table.js";
import type { FindingLog } from "../finding-log.js";

/** The rows of one series, 0-based and in the record's order. */
export interface RowGroup {
  readonly name: string;
  readonly rows: Int32Array;
}

/** The rows that `take` admits, split by the cells of the named columns; "" names the only group. */
export function groupRows(
  table: ColumnTable,
  by: readonly string[],
  taken: Int32Array,
  log: FindingLog,
): readonly RowGroup[] {
  if (by.length === 0) return [{ name: "", rows: taken }];
  const columns = by.map((name) => columnNamed(table, name, "a column that tells series apart"));
  const only = columns.length === 1 ? columns[0]! : undefined;
  const numbers = new Map<unknown, number>();
  const groupOf = new Int32Array(taken.length);
  let lastKey: unknown;
  let lastGroup = 0;
  for (let i = 0; i < taken.length; i++) {
    const row = taken[i]!;
    const key = only === undefined ? keyOf(columns, row) : only[row];
    if (key !== lastKey || i === 0) lastGroup = numberOf(key, numbers);
    if (lastGroup < 0) noteNameless(by, row, log);
    groupOf[i] = lastGroup;
    lastKey = key;
  }
  return named(rowsOfGroups(taken, groupOf, numbers.size), [...numbers.keys()], columns);
}

/** Number of a series, given as series appear; -1 for a row that names none. */
function numberOf(key: unknown, numbers: Map<unknown, number>): number {
  if (isEmpty(key)) return -1;
  const known = numbers.get(key);
  if (known !== undefined) return known;
  numbers.set(key, numbers.size);
  return numbers.size - 1;
}

/** Rows of each series, counted first and then filled: a record may have millions of rows. */
function rowsOfGroups(taken: Int32Array, groupOf: Int32Array, groups: number): readonly Int32Array[] {
  const counts = new Int32Array(groups);
  for (const group of groupOf) if (group >= 0) counts[group]!++;
  const rows = Array.from(counts, (count) => new Int32Array(count));
  counts.fill(0);
  for (let i = 0; i < taken.length; i++) {
    const group = groupOf[i]!;
    if (group >= 0) rows[group]![counts[group]!++] = taken[i]!;
  }
  return rows;
}

/** Cells as JSON: joined text would make "a, b" + "c" the same series as "a" + "b, c". */
function keyOf(columns: readonly Column[], row: number): string | undefined {
  const cells = columns.map((column) => column[row]);
  return cells.some(isEmpty) ? undefined : JSON.stringify(cells.map(String));
}

function named(
  rows: readonly Int32Array[],
  keys: readonly unknown[],
  columns: readonly Column[],
): readonly RowGroup[] {
  const taken = new Set<string>();
  return rows.map((own, i) => {
    const plain = columns.map((column) => String(column[own[0]!])).join(", ");
    const name = taken.has(plain) ? `${typeof keys[i]}: ${String(keys[i])}` : plain;
    taken.add(name);
    return { name, rows: own };
  });
}

function noteNameless(by: readonly string[], row: number, log: FindingLog): void {
  log.note({
    kind: "nameless-series",
    row: row + 1,
    column: by.join(", "),
    value: "",
    message: `Row ${row + 1} does not say which series it belongs to: ${by.join(", ")} is empty.`,
    done: "left out",
  });
}
