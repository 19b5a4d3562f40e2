import {
  labelBetween,
  type Observations,
  type ObservedGroup,
  type PeriodAxis,
} from "../../src/record/index.js";
import type { Axis } from "../figures/index.js";
import type { Column } from "../tables/index.js";

/** The horizontal axis of a figure whose places are times of the period column; `zero` is that of period 0. */
export function acrossPeriods(axis: PeriodAxis, zero: number): Axis {
  return axis.counts === "numbers"
    ? { title: axis.column, unit: axis.unit }
    : { title: axis.column, periods: { axis, zero } };
}

/** The axis for all groups of a record together. */
export function acrossRecord({ axis, groups }: Observations): Axis {
  return acrossPeriods(
    axis,
    groups.map(({ time }) => time[0]!).reduce((a, b) => Math.min(a, b)),
  );
}

/** The axis for one group, with a day of its own. */
export function acrossGroup({ axis, time }: ObservedGroup): Axis {
  return acrossPeriods(axis, time[0]!);
}

/** A column of a table that holds periods: labels where they have them, else numbers with their unit. */
export function periodColumn(key: string, label: string, axis: PeriodAxis): Column {
  return axis.counts === "numbers"
    ? { key, label, unit: axis.unit, kind: "number", digits: 6, grouped: false }
    : { key, label, kind: "text" };
}

/** A time of the period column as such a column holds it; `zero` is that of period 0. */
export function periodCell(axis: PeriodAxis, zero: number, time: number): string | number {
  return axis.counts === "numbers" ? time : labelBetween(axis, 0, (time - zero) / axis.step.every);
}
