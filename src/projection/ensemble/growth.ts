/** How a positive state grows in the long run under random change. */
export interface Growth {
  /** Mean of ln(x_T/x_0)/T over the paths, per period: E ln R, the rate at which a typical path grows. */
  readonly rate: number;
  readonly error: number;
  /** ln of the mean of x_T/x_0, over T: ln E R, which a few lucky paths carry. */
  readonly ofMean: number;
}

/**
 * Long-run growth from first and last values.
 *
 * @returns undefined where a path begins or ends at or below zero, or there is a single path.
 * @see Lewontin and Cohen (1969), On population growth in a randomly varying environment, PNAS 62:1056.
 */
export function growthOf(first: Float64Array, last: Float64Array, periods: number): Growth | undefined {
  let count = 0;
  let mean = 0;
  let squares = 0;
  let ratios = 0;
  for (let path = 0; path < last.length; path++) {
    const ratio = last[path]! / first[path]!;
    if (!(first[path]! > 0 && ratio > 0)) return undefined;
    count++;
    const rate = Math.log(ratio) / periods;
    const step = rate - mean;
    mean += step / count;
    squares += step * (rate - mean);
    ratios += ratio;
  }
  if (count < 2) return undefined;
  return {
    rate: mean,
    error: Math.sqrt(squares / (count - 1) / count),
    ofMean: Math.log(ratios / count) / periods,
  };
}
