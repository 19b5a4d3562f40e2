import { middle } from "./middle.js";

/** Times the usual distance (median absolute deviation; 1.4826 makes it comparable to a standard deviation). */
const unusual = 8;
const fewest = 7;
/** What is usual is told from at most this many evenly spaced places of a long series. */
const yardstick = 2000;

/**
 * Places of values far above both neighbours or far below both, compared with how far values usually lie from
 * the middle of their neighbours. A step from one level to another does not stand out.
 */
export function standsOut(values: Float64Array): readonly number[] {
  const last = values.length - 2;
  if (values.length < fewest) return [];
  const off = (i: number): number => values[i]! - (values[i - 1]! + values[i + 1]!) / 2;
  const spacing = Math.max(1, Math.floor(last / yardstick));
  const sample = new Float64Array(Math.ceil(last / spacing));
  for (let k = 0; k < sample.length; k++) sample[k] = off(1 + k * spacing);
  const centre = middle(sample);
  for (let k = 0; k < sample.length; k++) sample[k] = Math.abs(sample[k]! - centre);
  const least = unusual * 1.4826 * middle(sample);
  const found: number[] = [];
  for (let i = 1; least > 0 && i <= last; i++)
    if (Math.abs(off(i) - centre) > least && isApart(values, i)) found.push(i);
  return found;
}

/** Above both neighbours or below both, by more than these differ from each other. */
function isApart(values: Float64Array, i: number): boolean {
  const [before, after] = [values[i]! - values[i - 1]!, values[i]! - values[i + 1]!];
  const reach = 1.5 * Math.abs(values[i + 1]! - values[i - 1]!);
  return before * after > 0 && Math.min(Math.abs(before), Math.abs(after)) >= reach;
}
