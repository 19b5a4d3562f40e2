import type { Lowest, Objective } from "./objective.js";

/** The lowest and highest values at which unknowns are looked for, [unknowns]. */
export interface SearchBounds {
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/** How far beyond its middle start an unknown is looked for: farther out, rounding decides what a rule gives. */
const reach = 1e6;
/** By how much an unknown is let out farther that is stopped where the objective still falls. */
const further = 100;
/** A slope by the logarithm of an unknown, in units of the variance, that counts as falling. */
const falling = 1e-4;

/** The admitted values as far as a search should go: an unknown that runs off is stopped. */
export function searchBounds(
  { lower, upper }: SearchBounds,
  starts: readonly Float64Array[],
  beyond: number = reach,
): SearchBounds {
  const caps = lower.map((_, i) => {
    const sizes = starts.map((start) => Math.abs(start[i]!)).sort((a, b) => a - b);
    return beyond * Math.max(1, sizes[sizes.length >> 1]!);
  });
  return {
    lower: lower.map((low, i) => Math.max(low, -caps[i]!)),
    upper: upper.map((high, i) => Math.min(high, caps[i]!)),
  };
}

/** Whether unknown i sits where its search ends, short of what is admitted. */
export function isStopped(value: number, i: number, admitted: SearchBounds, within: SearchBounds): boolean {
  const { lower, upper } = within;
  if (lower[i] === upper[i]) return false;
  return (
    (value === lower[i] && value > admitted.lower[i]!) || (value === upper[i] && value < admitted.upper[i]!)
  );
}

/** The same bounds with one unknown held at a value. */
export function holding({ lower, upper }: SearchBounds, i: number, value: number): SearchBounds {
  const at = (limits: Float64Array): Float64Array => limits.map((limit, k) => (k === i ? value : limit));
  return { lower: at(lower), upper: at(upper) };
}

/** Where a search ended, and whether it was stopped by its bounds, not by what is admitted, while it still fell. */
export interface SearchEnd {
  readonly lowest: Lowest;
  readonly isHeldBack: boolean;
}

/**
 * Searches from a start inside the bounds of a search; where an unknown is stopped there although the objective still
 * falls, it is let out farther, inside what is admitted.
 *
 * @param variance - what an increase of the objective is divided by, at a value of it.
 * @param enough - a value as low as which a search that stops short may end.
 */
export function searchFrom(
  objective: Objective,
  start: Float64Array,
  admitted: SearchBounds,
  within: SearchBounds,
  variance: (value: number) => number,
  enough?: number,
): SearchEnd {
  const outer = widened(within, admitted);
  const search = (from: Float64Array, reached: SearchBounds): SearchEnd => {
    const lowest = objective.minimise(from, reached.lower, reached.upper, enough);
    const least = falling * variance(lowest.value);
    const isHeldBack = lowest.estimates.some(
      (value, i) => isStopped(value, i, admitted, reached) && Math.abs(objective.slope(i) * value) > least,
    );
    return { lowest, isHeldBack };
  };
  // A start that an earlier search was let out to stays where it is.
  const near = search(start, including(start, within, outer));
  return near.isHeldBack ? search(near.lowest.estimates, outer) : near;
}

/** Bounds moved as far outwards as a point asks for, but not beyond others. */
export function including(
  point: Float64Array,
  { lower, upper }: SearchBounds,
  outer: SearchBounds,
): SearchBounds {
  return {
    lower: lower.map((low, i) => Math.max(outer.lower[i]!, Math.min(low, point[i]!))),
    upper: upper.map((high, i) => Math.min(outer.upper[i]!, Math.max(high, point[i]!))),
  };
}

function widened({ lower, upper }: SearchBounds, admitted: SearchBounds): SearchBounds {
  return {
    lower: lower.map((low, i) => Math.max(admitted.lower[i]!, Math.min(low, further * low))),
    upper: upper.map((high, i) => Math.min(admitted.upper[i]!, Math.max(high, further * high))),
  };
}
