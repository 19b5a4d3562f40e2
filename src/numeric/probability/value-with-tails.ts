import type { Tails, TailsWithSlope } from "./tails.js";

const smallest = 2 ** -1020;
const largest = 2 ** 1020;

/**
 * The positive value with the given tails, of which the smaller one counts: Newton's iteration on its logarithm over
 * the logarithm of the value, inside a bracket that only shrinks. For gamma variables and for odds of beta variables
 * the logarithm of either tail is concave there, so the iteration runs in from one side.
 */
export function valueWithTails(at: (value: number) => TailsWithSlope, wanted: Tails, start: number): number {
  if (wanted.lower === 0) return 0;
  let value = Math.min(Math.max(start, smallest), largest);
  let low = 0;
  let high = Number.POSITIVE_INFINITY;
  if (wanted.upper === 0) return high;
  // What a number cannot hold is given as 0 or infinite.
  while (high > smallest && low < largest) {
    const { excess, step } = newtonStep(at(value), wanted);
    const next = value * Math.exp(step);
    if (Math.abs(step) < 1e-11) return next;
    [low, high] = excess > 0 ? [low, value] : [value, high];
    value = insideBracket(next, low, high);
    if (low >= high * (1 - Number.EPSILON)) break;
  }
  if (high <= smallest) return 0;
  return low >= largest ? Number.POSITIVE_INFINITY : value;
}

/** How far the smaller tail wanted is missed on the logarithmic scale, and the step that mends it there. */
function newtonStep(
  { lower, upper, slope }: TailsWithSlope,
  wanted: Tails,
): { readonly excess: number; readonly step: number } {
  const byLower = wanted.lower <= wanted.upper;
  const excess = byLower ? Math.log(lower / wanted.lower) : Math.log(wanted.upper / upper);
  return { excess, step: (-excess * (byLower ? lower : upper)) / slope };
}

/** The next value, or one that divides the bracket where the iteration leaves it. */
function insideBracket(next: number, low: number, high: number): number {
  if (next > low && next < high) return next;
  if (low === 0) return Math.max(high * 1e-3, smallest);
  return high === Number.POSITIVE_INFINITY ? Math.min(low * 1e3, largest) : Math.sqrt(low) * Math.sqrt(high);
}
