import { middle } from "./checked-series.js";

/** Times the usual distance (median absolute deviation; 1.4826 makes it comparable to a standard deviation). */
const unusual = 8;
const fewest = 7;

/**
 * Places of values far above both neighbours or far below both, compared with how far values usually lie from
 * the middle of their neighbours. A step from one level to another does not stand out.
 */
export function standsOut(values: ArrayLike<number>): readonly number[] {
  if (values.length < fewest) return [];
  const inner = Array.from({ length: values.length - 2 }, (_, i) => i + 1);
  const off = inner.map((i) => values[i]! - (values[i - 1]! + values[i + 1]!) / 2);
  const centre = middle(off);
  const usual = 1.4826 * middle(off.map((distance) => Math.abs(distance - centre)));
  if (usual === 0) return [];
  return inner.filter((i) => {
    const [before, after] = [values[i]! - values[i - 1]!, values[i]! - values[i + 1]!];
    const reach = 1.5 * Math.abs(values[i + 1]! - values[i - 1]!);
    const between = before * after <= 0 || Math.min(Math.abs(before), Math.abs(after)) < reach;
    return !between && Math.abs(off[i - 1]! - centre) > unusual * usual;
  });
}
