/** What a least-squares fit tells for choosing among rules. */
export interface Criteria {
  /** Normal log-likelihood at the optimum, with sigma^2 = RSS/n. */
  readonly logLikelihood: number;
  readonly aic: number;
  /** Infinite where n - k - 1 is not positive. */
  readonly aicCorrected: number;
  /** k: the free unknowns and sigma. */
  readonly counted: number;
}

/**
 * Log-likelihood, AIC and its small-sample correction of a fit with normal errors.
 *
 * logLik = -n/2 (ln(2 pi RSS/n) + 1),  AIC = 2k - 2 logLik,  AICc = AIC + 2k(k+1)/(n-k-1), where k counts sigma.
 *
 * @see Hurvich, C. M. and Tsai, C.-L. (1989), Regression and time series model selection in small samples,
 *   Biometrika 76: the correction.
 */
export function criteria(sumOfSquares: number, count: number, free: number): Criteria {
  const counted = free + 1;
  const logLikelihood = (-count / 2) * (Math.log((2 * Math.PI * sumOfSquares) / count) + 1);
  const aic = 2 * counted - 2 * logLikelihood;
  const room = count - counted - 1;
  const aicCorrected = room > 0 ? aic + (2 * counted * (counted + 1)) / room : Number.POSITIVE_INFINITY;
  return { logLikelihood, aic, aicCorrected, counted };
}
