import type { ObservedGroup } from "../observations.js";
import { axisOfRows } from "./axis-of-rows.js";
import { type PeriodAxis, periodsAfter } from "./period-axis.js";
import type { PlacedRows } from "./placed-rows.js";

/** The axis of all groups of a record, whose period 0 is the earliest row of them. */
export function axisOfGroups(groups: readonly ObservedGroup[], periods: PlacedRows): PeriodAxis {
  const starts = groups.map(({ rows }) => periods.position[rows[0]! - 1]!);
  const earliest = starts.reduce((a, b) => Math.min(a, b));
  const first = groups[starts.indexOf(earliest)]!;
  if (groups.every(({ axis }) => isAlike(first.axis, axis))) return first.axis;
  const ordered = [first, ...groups.filter((group) => group !== first)];
  return axisOfRows(periods, {
    rows: Int32Array.from(ordered.flatMap(({ rows }) => Array.from(rows, (row) => row - 1))),
    index: Int32Array.from(
      ordered.flatMap(({ index, rows }) => {
        const before = Math.round(periods.position[rows[0]! - 1]! - earliest);
        return Array.from(index, (i) => i + before);
      }),
    ),
  });
}

/** Whether two axes write their periods alike and lie on each other's. */
function isAlike(axis: PeriodAxis, other: PeriodAxis): boolean {
  const { form, day, clock, origin, stride } = axis;
  if (other.form !== form || other.day !== day || other.clock !== clock) return false;
  if (axis.counts === "numbers") return periodsAfter(axis, other) !== undefined;
  return Number.isInteger((other.origin - origin) / stride);
}
