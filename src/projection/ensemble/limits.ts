/** Limits of the states [states, 2], open ones at the largest numbers, so that what is not finite lies outside. */
export const finiteLimits = (limits: readonly (readonly [number, number])[]): Float64Array =>
  Float64Array.from(
    limits.flatMap(([low, high]) => [Math.max(low, -Number.MAX_VALUE), Math.min(high, Number.MAX_VALUE)]),
  );

/** Limits that nothing lies outside of. */
export const unlimited = (length: number): Float64Array =>
  Float64Array.from({ length }, (_, i) =>
    i % 2 === 0 ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY,
  );

/** Ends the paths of which a state lies out of range: all their values are NaN from there on. */
export function endOutside(
  limits: Float64Array,
  present: Float64Array,
  first: number,
  last: number,
  width: number,
): void {
  const states = limits.length / 2;
  if (isOpen(limits) && allFinite(present, first * width, last * width)) return;
  for (let s = 0; s < states; s++) {
    const low = limits[2 * s]!;
    const high = limits[2 * s + 1]!;
    for (let at = first * width + s; at < last * width; at += width) {
      const value = present[at]!;
      if (!(value >= low && value <= high)) present.fill(Number.NaN, at - s, at - s + width);
    }
  }
}

function isOpen(limits: Float64Array): boolean {
  for (let i = 0; i < limits.length; i++) if (Math.abs(limits[i]!) < Number.MAX_VALUE) return false;
  return true;
}

/** One sum of differences that are 0 for numbers and NaN for all else: no branch a value. */
function allFinite(values: Float64Array, from: number, to: number): boolean {
  let zero = 0;
  for (let at = from; at < to; at++) zero += values[at]! - values[at]!;
  return zero === 0;
}
