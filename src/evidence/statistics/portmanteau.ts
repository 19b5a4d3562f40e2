import { chiSquareUpperTail } from "../../numeric/index.js";
import { autocorrelations } from "./autocorrelation.js";

/** A test statistic, its degrees of freedom, and the probability of one as large under the hypothesis. */
export interface ChiSquareTest {
  readonly statistic: number;
  readonly degreesOfFreedom: number;
  readonly probability: number;
}

/**
 * Whether the first `lags` autocorrelations together are larger than chance: Q = n(n+2) sum r_k^2 / (n-k).
 *
 * @param series - one value a period, NaN where there is none.
 * @param fitted - parameters of a fitted autoregression, taken off the degrees of freedom; default 0.
 * @see Ljung, G. M. and Box, G. E. P. (1978), On a measure of lack of fit in time series models, Biometrika 65.
 */
export function ljungBox(series: ArrayLike<number>, lags: number, fitted = 0): ChiSquareTest {
  return portmanteau(series, lags, fitted, (n, k) => (n * (n + 2)) / (n - k));
}

/**
 * The same with equal weights: Q = n sum r_k^2.
 *
 * @see Box, G. E. P. and Pierce, D. A. (1970), Journal of the American Statistical Association 65.
 */
export function boxPierce(series: ArrayLike<number>, lags: number, fitted = 0): ChiSquareTest {
  return portmanteau(series, lags, fitted, (n) => n);
}

function portmanteau(
  series: ArrayLike<number>,
  lags: number,
  fitted: number,
  weight: (count: number, lag: number) => number,
): ChiSquareTest {
  const count = Array.from(series).filter((value) => !Number.isNaN(value)).length;
  const statistic = autocorrelations(series, lags).reduce(
    (sum, correlation, k) => sum + weight(count, k + 1) * correlation * correlation,
    0,
  );
  const degreesOfFreedom = Math.max(1, lags - fitted);
  return { statistic, degreesOfFreedom, probability: chiSquareUpperTail(statistic, degreesOfFreedom) };
}
