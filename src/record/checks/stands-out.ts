import { middle } from "./middle.js";

/** Times the usual distance (median absolute deviation; 1.4826 makes it comparable to a standard deviation). */
const unusual = 8;
const fewest = 7;
/** What is usual is told from at most this many evenly spaced places of a long series. */
const yardstick = 120;

/**
 * Places of values far above both neighbours or far below both, compared with how far values usually lie from
 * the middle of their neighbours. A step from one level to another does not stand out.
 */
export function standsOut(values: Float64Array): readonly number[] {
  if (values.length < fewest) return [];
  const { centre, usual } = usualOff(values);
  const least = unusual * usual;
  const found: number[] = [];
  if (!(least > 0)) return found;
  for (let i = 1; i < values.length - 1; i++) {
    const off = values[i]! - (values[i - 1]! + values[i + 1]!) / 2 - centre;
    if ((off > least || off < -least) && isApart(values, i)) found.push(i);
  }
  return found;
}

/** How far values lie from the middle of their neighbours: the median, and the usual distance from it. */
function usualOff(values: Float64Array): { readonly centre: number; readonly usual: number } {
  const inner = values.length - 2;
  const spacing = Math.max(1, Math.floor(inner / yardstick));
  const sample = new Float64Array(Math.ceil(inner / spacing));
  for (let k = 0, i = 1; k < sample.length; k++, i += spacing)
    sample[k] = values[i]! - (values[i - 1]! + values[i + 1]!) / 2;
  const centre = middle(sample);
  for (let k = 0; k < sample.length; k++) sample[k] = Math.abs(sample[k]! - centre);
  return { centre, usual: 1.4826 * middle(sample) };
}

/** Above both neighbours or below both, by more than these differ from each other. */
function isApart(values: Float64Array, i: number): boolean {
  const [before, after] = [values[i]! - values[i - 1]!, values[i]! - values[i + 1]!];
  const reach = 1.5 * Math.abs(values[i + 1]! - values[i - 1]!);
  return before * after > 0 && Math.min(Math.abs(before), Math.abs(after)) >= reach;
}
