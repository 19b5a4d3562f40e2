import { binomialProbability } from "./point-probability.js";
import { continuedFraction, type TailsWithSlope, tailsFromLower, tailsFromUpper } from "./tails.js";

/**
 * Both tails of the beta distribution at x: the regularised incomplete beta function and its complement. The tail in
 * which x lies is worked out itself, never as 1 less the other.
 *
 * @param y - 1 - x, given apart so that it keeps its digits where x is near 1.
 * @see Didonato and Morris (1992), Algorithm 708: Significant Digit Computation of the Incomplete Beta Function Ratios,
 *   ACM TOMS 18:360, the continued fraction.
 */
export function betaTails(a: number, b: number, x: number, y: number): TailsWithSlope {
  if (!(x > 0)) return tailsFromLower(0);
  if (!(y > 0)) return tailsFromUpper(0);
  // x^a y^b / B(a, b): also the slope over the logarithm of the odds.
  const slope = ((a * b) / (a + b)) * binomialProbability(a, b, x, y);
  const apart = a * y - b * x;
  return apart >= 0
    ? tailsFromLower(slope / fraction(a, b, x, apart), slope)
    : tailsFromUpper(slope / fraction(b, a, y, -apart), slope);
}

function fraction(a: number, b: number, x: number, apart: number): number {
  const even = (m: number): number => (m === 0 ? 0 : m + (m * (b - m) * x) / (a + 2 * m - 1));
  return continuedFraction(
    (m) => ((a + m - 1) * (a + b + m - 1) * m * (b - m) * x * x) / (a + 2 * m - 1) ** 2,
    (m) => even(m) + ((a + m) * (apart + 1 + m * (2 - x))) / (a + 2 * m + 1),
  );
}
