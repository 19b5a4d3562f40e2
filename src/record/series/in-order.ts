import type { FindingLog } from "../finding-log.js";
import type { PlacedRows } from "../period/placed-rows.js";
import type { RowGroup } from "./group-rows.js";
import { notIncreasing } from "./refusals.js";

/**
 * The rows of a series by increasing period; rows of one period keep the record's order.
 *
 * @throws {ModelError} `not-increasing` unless the analyst chose to sort.
 */
export function inOrder(
  group: RowGroup,
  periods: PlacedRows,
  disorder: "refuse" | "sort",
  log: FindingLog,
): Int32Array {
  const { position } = periods;
  const { rows } = group;
  let outOfOrder = 0;
  for (let i = 1; i < rows.length; i++) {
    if (position[rows[i]!]! >= position[rows[i - 1]!]!) continue;
    if (disorder === "refuse") throw refusal(group, periods, i);
    outOfOrder++;
    noteSorted(group, periods, i, log);
  }
  if (outOfOrder === 0) return rows;
  return rows.slice().sort((a, b) => position[a]! - position[b]! || a - b);
}

function refusal(group: RowGroup, periods: PlacedRows, i: number): Error {
  const [before, now] = [group.rows[i - 1]!, group.rows[i]!];
  return notIncreasing(now + 1, periods.column, group.name, periods.written(before), periods.written(now));
}

function noteSorted(group: RowGroup, periods: PlacedRows, i: number, log: FindingLog): void {
  const [before, now] = [group.rows[i - 1]!, group.rows[i]!];
  log.note({
    kind: "disorder",
    row: now + 1,
    column: periods.column,
    value: periods.written(now),
    message: `Times are not increasing at row ${now + 1}: ${periods.written(now)} follows ${periods.written(before)}.`,
    done: "sorted by period",
  });
}
