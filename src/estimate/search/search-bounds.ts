import type { Lowest, Objective } from "./objective.js";

/** The lowest and highest values at which unknowns are looked for, [unknowns]. */
export interface SearchBounds {
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/** How far beyond its middle start an unknown is looked for: farther out, rounding decides what a rule gives. */
const reach = 1e6;
/** By how much an unknown is let out that is stopped where the objective still falls, and how often. */
const further = 1e3;
const times = 4;
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

/**
 * Searches from a start inside the bounds of a search; where an unknown is stopped there although the objective still
 * falls, it is let out farther, up to what is admitted.
 *
 * @param variance - what an increase of the objective is divided by, at a value of it.
 */
export function searchFrom(
  objective: Objective,
  start: Float64Array,
  admitted: SearchBounds,
  within: SearchBounds,
  variance: (value: number) => number,
): Lowest {
  let found = objective.minimise(start, within.lower, within.upper);
  let { lower, upper } = within;
  for (let time = 0; time < times; time++) {
    const at = found.estimates;
    const least = falling * variance(found.value);
    const reached = { lower, upper };
    const out = Array.from(
      at,
      (value, i) => isStopped(value, i, admitted, reached) && Math.abs(objective.slope(i) * value) > least,
    );
    if (!out.includes(true)) break;
    lower = lower.map((low, i) =>
      out[i] ? Math.max(admitted.lower[i]!, low - further * Math.abs(low)) : low,
    );
    upper = upper.map((high, i) =>
      out[i] ? Math.min(admitted.upper[i]!, high + further * Math.abs(high)) : high,
    );
    found = objective.minimise(at, lower, upper);
  }
  return found;
}
