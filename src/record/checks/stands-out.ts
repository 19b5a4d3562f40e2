import { middle } from "./middle.js";

/** Times the usual distance (median absolute deviation; 1.4826 makes it comparable to a standard deviation). */
const unusual = 8;
const fewest = 7;

/**
 * Places of values far above both neighbours or far below both, compared with how far values usually lie from
 * the middle of their neighbours. A step from one level to another does not stand out.
 */
export function standsOut(values: Float64Array): readonly number[] {
  if (values.length < fewest) return [];
  const off = new Float64Array(values.length - 2);
  for (let i = 0; i < off.length; i++) off[i] = values[i + 1]! - (values[i]! + values[i + 2]!) / 2;
  const centre = middle(off.slice());
  for (let i = 0; i < off.length; i++) off[i] = Math.abs(off[i]! - centre);
  const least = unusual * 1.4826 * middle(off.slice());
  const found: number[] = [];
  for (let i = 0; least > 0 && i < off.length; i++)
    if (off[i]! > least && isApart(values, i + 1)) found.push(i + 1);
  return found;
}

/** Above both neighbours or below both, by more than these differ from each other. */
function isApart(values: Float64Array, i: number): boolean {
  const [before, after] = [values[i]! - values[i - 1]!, values[i]! - values[i + 1]!];
  const reach = 1.5 * Math.abs(values[i + 1]! - values[i - 1]!);
  return before * after > 0 && Math.min(Math.abs(before), Math.abs(after)) >= reach;
}
