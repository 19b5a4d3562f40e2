import { type CheckedSeries, noteValue, periodOf } from "./checked-series.js";
import { standsOut } from "./stands-out.js";

/** A level far from both of its neighbours. It is told, never smoothed away. */
export function spike(series: CheckedSeries): void {
  const { values, logarithms, measured } = series;
  if (measured !== "level") return;
  for (const i of standsOut(logarithms ?? values)) {
    const message = `${periodOf(series, i)}: ${values[i]} lies far from its neighbours ${values[i - 1]} and ${values[i + 1]}.`;
    noteValue(series, i, "spike", message);
  }
}
