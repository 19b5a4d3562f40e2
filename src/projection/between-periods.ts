/**
 * How far between two neighbouring values of a path a third one lies, as a share of the period, on the curve that
 * carries each value into the next: the fractional step of the Moebius map x' = (a x + b)/(c x + d) through
 * four neighbouring values of the path.
 *
 * Exact for the geometric, affine and Beverton-Holt rules, which are such maps; for other smooth rules it follows the
 * bend of the path. Four values have the cross-ratio of 1, k, k^2, k^3, which gives the multiplier k; a value's own
 * cross-ratio with the first three is that of k^share.
 *
 * @param four - neighbouring values, strictly rising or falling.
 * @returns periods from the first value; undefined where the values are not monotone, k is not real, or the
 *   differences have lost their digits.
 * @see Needham (1997), Visual Complex Analysis, chapter 3, for cross-ratios and multipliers (from memory).
 */
export function periodsFromFirst(four: readonly number[], value: number): number | undefined {
  const [x0, x1, x2, x3] = four as [number, number, number, number];
  const step = Math.sign(x1 - x0);
  if (step === 0 || Math.sign(x2 - x1) !== step || Math.sign(x3 - x2) !== step) return undefined;
  const scale = Math.max(...four.map(Math.abs));
  const least = Math.min(Math.abs(x1 - x0), Math.abs(x2 - x1), Math.abs(x3 - x2));
  if (least < 1e-7 * scale) return undefined;
  const cross = ((x0 - x2) * (x1 - x3)) / ((x1 - x2) * (x0 - x3));
  // With 1, k, k^2, k^3 the cross-ratio is (s + 2)/(s + 1), s = k + 1/k.
  const excess = (2 - cross) / (cross - 1) - 2;
  if (!(excess > -1e-6 && Number.isFinite(excess))) return undefined;
  const share = ((value - x0) * (x1 - x2)) / ((value - x2) * (x1 - x0));
  if (value === x2) return 2;
  if (excess < 1e-6) return (2 * share) / (1 + share);
  const half = excess / 2;
  const k = 1 + half - Math.sqrt(half * (half + 2));
  const power = (k + share * k * k) / (k + share);
  return power > 0 ? Math.log(power) / Math.log(k) : undefined;
}
