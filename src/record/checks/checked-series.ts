import type { FindingLog } from "../finding-log.js";
import type { ObservedGroup, ObservedState } from "../observations.js";

/** One state of one series as a check looks at it. */
export interface CheckedSeries {
  readonly group: ObservedGroup;
  readonly state: ObservedState;
  readonly values: Float64Array;
  /** Natural logarithms of levels that are all positive. */
  readonly logarithms: Float64Array | undefined;
  readonly measured: "level" | "flow";
  /** Name of the period column. */
  readonly period: string;
  readonly log: FindingLog;
}

/** "week 14", or "week 14 of "ropes"" where there are several series. */
export function periodOf({ group, period }: CheckedSeries, i: number): string {
  const at = group.labels?.[i] ?? String(group.time[i]!);
  return group.name === "" ? `${period} ${at}` : `${period} ${at} of "${group.name}"`;
}

/** Notes something about the value at place `i` of a series; nothing is altered. */
export function noteValue(series: CheckedSeries, i: number, kind: string, message: string): void {
  series.log.note({
    kind,
    row: series.group.rows[i]!,
    column: series.state.column,
    value: String(series.values[i]!),
    message,
    done: "kept",
  });
}

/** Notes something about the whole series. */
export function noteSeries(series: CheckedSeries, kind: string, value: string, message: string): void {
  series.log.note({ kind, row: undefined, column: series.state.column, value, message, done: "kept" });
}

/** " in "ropes"" where there are several series. */
export function inSeries({ group }: CheckedSeries): string {
  return group.name === "" ? "" : ` in "${group.name}"`;
}
