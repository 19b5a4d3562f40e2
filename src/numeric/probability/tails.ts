/** The two parts into which a value divides a distribution; the smaller one carries full relative precision. */
export interface Tails {
  /** Probability of at most the value. */
  readonly lower: number;
  /** Probability of more than the value. */
  readonly upper: number;
}

/** The tails that a value is to have, as they follow from one of them. */
export interface WantedTails extends Tails {
  readonly given?: "lower" | "upper";
}

/** Tails at a positive value, and by how much the lower one grows with the logarithm of the value. */
export interface TailsWithSlope extends Tails {
  readonly slope: number;
}

export function tailsFromLower(lower: number, slope = 0): TailsWithSlope {
  return { lower, upper: 1 - lower, slope };
}

export function tailsFromUpper(upper: number, slope = 0): TailsWithSlope {
  return { lower: 1 - upper, upper, slope };
}

/**
 * The continued fraction b(0) + a(1)/(b(1) + a(2)/(b(2) + ...)), by the modified method of Lentz.
 *
 * @see Thompson and Barnett (1986), Coulomb and Bessel functions of complex arguments and order, Journal of
 *   Computational Physics 64:490.
 */
export function continuedFraction(a: (k: number) => number, b: (k: number) => number): number {
  const tiny = 1e-290;
  let value = b(0) || tiny;
  let c = value;
  let d = 0;
  for (let k = 1; ; k++) {
    const numerator = a(k);
    const denominator = b(k);
    d = 1 / (denominator + numerator * d || tiny);
    c = denominator + numerator / c || tiny;
    const factor = c * d;
    value *= factor;
    if (!(Math.abs(factor - 1) > Number.EPSILON)) return value;
  }
}
