import { continuedFraction } from "./tails.js";

/** Density of the standard normal distribution. */
export function normalDensity(value: number): number {
  if (Math.abs(value) > 40) return 0;
  // Squared first is a number of few bits: the rounding of value^2 itself would cost three digits far out.
  const coarse = Math.round(value * 16) / 16;
  const rest = Math.exp(-0.5 * (value - coarse) * (value + coarse));
  return (Math.exp(-0.5 * coarse * coarse) * rest) / Math.sqrt(2 * Math.PI);
}

/** Probability that a standard normal value is at most `value`. @example normalCdf(0); // 0.5 */
export function normalCdf(value: number): number {
  return normalUpperTail(-value);
}

/**
 * Probability that a standard normal value is above `value`: as many digits in a far tail as in the middle.
 *
 * @see Abramowitz and Stegun (1964), Handbook of Mathematical Functions, formulas 26.2.11 (series) and 26.2.14
 *   (continued fraction).
 * @example normalUpperTail(10); // 7.61985302416053e-24
 */
export function normalUpperTail(value: number): number {
  if (value < -2) return 1 - normalUpperTail(-value);
  if (value > 40) return 0;
  if (value > 2)
    return (
      normalDensity(value) /
      continuedFraction(
        (k) => k,
        () => value,
      )
    );
  let term = value;
  let sum = value;
  for (let k = 3; Math.abs(term) > Number.EPSILON * Math.abs(sum); k += 2) {
    term *= (value * value) / k;
    sum += term;
  }
  return 0.5 - normalDensity(value) * sum;
}

/**
 * The standard normal value with the given probabilities below and above it, of which the smaller one counts.
 *
 * @see Abramowitz and Stegun (1964), formula 26.2.23 for the first guess, good to 5e-4; then Halley's iteration on the
 *   tail, each step of which triples the digits.
 */
export function normalAt(lower: number, upper: number): number {
  const tail = Math.min(lower, upper);
  if (lower === upper) return 0;
  if (tail === 0) return lower === 0 ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  const t = Math.sqrt(-2 * Math.log(tail));
  let z =
    t - (2.515517 + t * (0.802853 + t * 0.010328)) / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308)));
  for (let k = 0; k < 3; k++) {
    const step = (normalUpperTail(z) - tail) / normalDensity(z);
    z += step / (1 - 0.5 * z * step);
  }
  return lower < upper ? -z : z;
}
