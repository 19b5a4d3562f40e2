/**
 * Sum of squared differences of neighbouring residuals over their sum of squares: near 2 where neighbours are
 * unrelated, below where they agree, above where they alternate.
 *
 * @param series - one residual a period, NaN where there is none; differences are taken of neighbours only.
 * @see Durbin, J. and Watson, G. S. (1950), Testing for serial correlation in least squares regression, Biometrika 37.
 */
export function durbinWatson(series: ArrayLike<number>): number {
  let differences = 0;
  let squares = 0;
  for (let t = 0; t < series.length; t++) {
    const value = series[t]!;
    if (Number.isNaN(value)) continue;
    squares += value * value;
    const before = series[t - 1] ?? Number.NaN;
    if (!Number.isNaN(before)) differences += (value - before) ** 2;
  }
  return differences / squares;
}
