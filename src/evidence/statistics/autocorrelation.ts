/**
 * Autocorrelations of a series at lags 1 to `lags`: r_k = sum (x_t - m)(x_{t+k} - m) / sum (x_t - m)^2.
 *
 * @param series - one value a period; NaN where a period has none, and pairs that lack a value are left out.
 * @returns [lags], lag 1 first.
 * @see Box, G. E. P. and Jenkins, G. M. (1970), Time Series Analysis, section 2.1.
 */
export function autocorrelations(series: ArrayLike<number>, lags: number): number[] {
  const values = Array.from(series);
  const present = values.filter((value) => !Number.isNaN(value));
  const mean = present.reduce((sum, value) => sum + value, 0) / present.length;
  const away = values.map((value) => (Number.isNaN(value) ? 0 : value - mean));
  const whole = away.reduce((sum, value) => sum + value * value, 0);
  return Array.from({ length: lags }, (_, k) => {
    let sum = 0;
    for (let t = k + 1; t < away.length; t++) sum += away[t]! * away[t - k - 1]!;
    return sum / whole;
  });
}

/**
 * Partial autocorrelations from autocorrelations: what lag k still tells when the lags before it are known.
 *
 * @param correlations - [lags], lag 1 first.
 * @see Durbin, J. (1960), The fitting of time-series models, Review of the International Statistical Institute 28.
 */
export function partialAutocorrelations(correlations: readonly number[]): number[] {
  let weights: number[] = [];
  return correlations.map((correlation, k) => {
    const explained = weights.reduce((sum, weight, j) => sum + weight * correlations[k - 1 - j]!, 0);
    const share = weights.reduce((sum, weight, j) => sum + weight * correlations[j]!, 0);
    const partial = (correlation - explained) / (1 - share);
    weights = [...weights.map((weight, j) => weight - partial * weights[k - 1 - j]!), partial];
    return partial;
  });
}
