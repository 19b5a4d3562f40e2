import { type CheckedSeries, noteValue, periodOf } from "./checked-series.js";
import { standsOut } from "./stands-out.js";

/** Larger jumps are a matter of units. */
const largest = Math.log(4);

/** A change unlike those before and after it, in a level that otherwise changes evenly: a fee, a late entry, a feed. */
export function oddChange(series: CheckedSeries): void {
  const { values, logarithms, group } = series;
  if (logarithms === undefined) return;
  const rates = new Float64Array(Math.max(0, values.length - 1));
  for (let i = 0; i < rates.length; i++)
    rates[i] = (logarithms[i + 1]! - logarithms[i]!) / (group.index[i + 1]! - group.index[i]!);
  for (const i of standsOut(rates)) {
    if (Math.abs(rates[i]!) > largest) continue;
    const change = Number((values[i + 1]! - values[i]!).toPrecision(6));
    const message = `${periodOf(series, i + 1)}: the change ${change} from ${values[i]} to ${values[i + 1]} is unlike the changes before and after it.`;
    noteValue(series, i + 1, "odd-change", message);
  }
}
