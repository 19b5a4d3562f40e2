import type { FindingLog } from "../finding-log.js";
import type { ObservedGroup } from "../observations.js";
import { isMonthEnd } from "./moment.js";
import type { PlacedRows } from "./placed-rows.js";

/** Notes dates that are not the last day of their month, where month ends were said to be recorded. */
export function noteMonthEnds(groups: readonly ObservedGroup[], periods: PlacedRows, log: FindingLog): void {
  const { moments, calendar, column, form, written } = periods;
  if (calendar.name !== "month-end" || moments === undefined || form === "month") return;
  for (const row of groups.flatMap(({ rows }) => Array.from(rows))) {
    if (isMonthEnd(moments[row - 1]!)) continue;
    log.note({
      kind: "not-month-end",
      row,
      column,
      value: written(row - 1),
      message: `Row ${row}: ${column} ${written(row - 1)} is not the last day of its month.`,
      done: "kept in its month",
    });
  }
}
