import { type CheckedSeries, noteValue, periodOf } from "./checked-series.js";
import { middle } from "./middle.js";

/** Packs and cases, and shifted decimal points. */
const factors = [6, 10, 12, 24, 100, 1000];
const within = 1.08;

/** A change by the size of a pack or a power of ten, far beyond the usual one: a change of unit. */
export function unitJump(series: CheckedSeries): void {
  const { values } = series;
  const jumps = jumpsIn(values);
  if (values.length < 4 || jumps.length === 0) return;
  const usual = middle(values.subarray(1).map((value, i) => Math.abs(Math.log(value / values[i]!))));
  for (const i of jumps) {
    const [before, now] = [values[i - 1]!, values[i]!];
    if (Math.abs(Math.log(now / before)) < 5 * usual) continue;
    const change = `${now} is about ${before} ${now > before ? "times" : "divided by"} ${factorOf(before, now)}`;
    const message = `${periodOf(series, i)}: ${change}; a change of unit or pack, or a shifted decimal point? Give the factor, or correct the rows.`;
    noteValue(series, i, "unit-jump", message);
  }
}

/** Places of changes by a factor; none where a value is not positive. */
function jumpsIn(values: Float64Array): readonly number[] {
  const jumps: number[] = [];
  for (let i = 0; i < values.length; i++) {
    if (!(values[i]! > 0)) return [];
    if (i > 0 && factorOf(values[i - 1]!, values[i]!) !== undefined) jumps.push(i);
  }
  return jumps;
}

function factorOf(before: number, now: number): number | undefined {
  const ratio = now > before ? now / before : before / now;
  if (ratio < factors[0]! / within) return undefined;
  return factors.find((factor) => ratio < factor * within && ratio > factor / within);
}
