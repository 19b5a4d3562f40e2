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
  const groups = new Map<unknown, number[]>();
  for (const row of taken) {
    const key = columns.length === 1 ? columns[0]![row] : keyOf(columns, row);
    if (key === undefined || isEmpty(key)) noteNameless(by, row, log);
    else {
      const rows = groups.get(key);
      if (rows === undefined) groups.set(key, [row]);
      else rows.push(row);
    }
  }
  return named(groups, columns);
}

/** Cells as JSON: joined text would make "a, b" + "c" the same series as "a" + "b, c". */
function keyOf(columns: readonly Column[], row: number): string | undefined {
  const cells = columns.map((column) => column[row]);
  return cells.some(isEmpty) ? undefined : JSON.stringify(cells.map(String));
}

function named(groups: Map<unknown, number[]>, columns: readonly Column[]): readonly RowGroup[] {
  const taken = new Set<string>();
  return Array.from(groups, ([key, rows]) => {
    const plain = columns.map((column) => String(column[rows[0]!])).join(", ");
    const name = taken.has(plain) ? `${typeof key}: ${String(key)}` : plain;
    taken.add(name);
    return { name, rows: Int32Array.from(rows) };
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
