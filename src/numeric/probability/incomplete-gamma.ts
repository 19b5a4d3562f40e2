import { poissonProbability } from "./point-probability.js";
import { continuedFraction, type TailsWithSlope, tailsFromLower, tailsFromUpper } from "./tails.js";

/**
 * Both tails of the gamma distribution with scale 1 at x: the regularised incomplete gamma functions P and Q. The tail
 * in which x lies is worked out itself, never as 1 less the other.
 *
 * @see Abramowitz and Stegun (1964), Handbook of Mathematical Functions, formulas 6.5.29 (series) and 6.5.31
 *   (continued fraction).
 */
export function gammaTails(shape: number, x: number): TailsWithSlope {
  if (!(x > 0)) return tailsFromLower(0);
  if (x === Number.POSITIVE_INFINITY) return tailsFromUpper(0);
  const point = poissonProbability(shape, x);
  const slope = shape * point;
  return x < shape + 1
    ? tailsFromLower(point * lowerSeries(shape, x), slope)
    : tailsFromUpper(slope / upperFraction(shape, x), slope);
}

/** 1 + x/(a + 1) + x^2/((a + 1)(a + 2)) + ... */
function lowerSeries(shape: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let k = shape + 1; term > sum * Number.EPSILON * 0.25; k++) {
    term *= x / k;
    sum += term;
  }
  return sum;
}

/** x + 1 - a - 1(1 - a)/(x + 3 - a - 2(2 - a)/(x + 5 - a - ...)). */
function upperFraction(shape: number, x: number): number {
  return continuedFraction(
    (k) => k * (shape - k),
    (k) => x - shape + 2 * k + 1,
  );
}
