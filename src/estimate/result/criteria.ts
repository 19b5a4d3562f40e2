import type { FitOptions } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";

/** What a fit tells for choosing among rules. */
export interface Criteria {
  /** Log-likelihood at the optimum; of least squares the normal one, with sigma^2 = RSS/n. */
  readonly logLikelihood: number;
  readonly aic: number;
  /** Infinite where n - k - 1 is not positive. */
  readonly aicCorrected: number;
  /** k ln n - 2 log-likelihood. */
  readonly bic: number;
  /** k: the free unknowns, and sigma where it was found from the record. */
  readonly counted: number;
  /** n: values compared. */
  readonly count: number;
}

/**
 * Log-likelihood, AIC and its small-sample correction of a fit with normal errors.
 *
 * logLik = -n/2 (ln(2 pi RSS/n) + 1) + sum ln w^(1/2);  AIC = 2k - 2 logLik,  AICc = AIC + 2k(k+1)/(n-k-1), where k
 * counts sigma unless its value was given.
 *
 * @see Hurvich, C. M. and Tsai, C.-L. (1989), Regression and time series model selection in small samples,
 *   Biometrika 76: the correction.
 */
export function criteria(sumOfSquares: number, rows: FitRows, { sd }: FitOptions): Criteria {
  const { count, size, roots } = rows;
  const known = sd !== undefined;
  const weights = roots.reduce((sum, root) => sum + Math.log(root), 0);
  const normal = known
    ? -0.5 * (count * Math.log(2 * Math.PI) + sumOfSquares)
    : (-count / 2) * (Math.log((2 * Math.PI * sumOfSquares) / count) + 1);
  return criteriaOf(normal + weights, count, known ? size : size + 1);
}

/** The criteria of a log-likelihood with `counted` unknowns. */
export function criteriaOf(logLikelihood: number, count: number, counted: number): Criteria {
  const aic = 2 * counted - 2 * logLikelihood;
  const room = count - counted - 1;
  const aicCorrected = room > 0 ? aic + (2 * counted * (counted + 1)) / room : Number.POSITIVE_INFINITY;
  const bic = counted * Math.log(count) - 2 * logLikelihood;
  return { logLikelihood, aic, aicCorrected, bic, counted, count };
}

/** The criteria of groups fitted by themselves, each an independent model with a sigma of its own: all of them add up. */
export function addedCriteria(groups: readonly Criteria[]): Criteria {
  const sum = (of: (criteria: Criteria) => number): number =>
    groups.reduce((total, each) => total + of(each), 0);
  return {
    logLikelihood: sum((each) => each.logLikelihood),
    aic: sum((each) => each.aic),
    aicCorrected: sum((each) => each.aicCorrected),
    bic: sum((each) => each.bic),
    counted: sum((each) => each.counted),
    count: sum((each) => each.count),
  };
}
