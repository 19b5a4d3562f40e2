import { type CheckedSeries, inSeries, noteSeries } from "./checked-series.js";

/** A series of one value says nothing of a rule. */
export function neverChanges(series: CheckedSeries): void {
  const { values, state } = series;
  if (values.length < 2 || values.some((value) => value !== values[0])) return;
  const message = `The value of ${state.column}${inSeries(series)} never changes: multiplier 1 cannot be separated from no process.`;
  noteSeries(series, "never-changes", String(values[0]), message);
}
