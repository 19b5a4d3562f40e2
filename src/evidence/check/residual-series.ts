/**
 * Residuals by step index, from the first compared one on; NaN where none was compared.
 *
 * @param index - step index of each residual, increasing.
 */
export function residualSeries(index: readonly number[], residuals: readonly number[]): Float64Array {
  const first = index[0] ?? 0;
  const last = index[index.length - 1] ?? -1;
  const series = new Float64Array(last - first + 1).fill(Number.NaN);
  residuals.forEach((residual, i) => {
    series[index[i]! - first] = residual;
  });
  return series;
}
