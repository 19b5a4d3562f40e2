import type { StopReason, UnscaledCovariance } from "../../numeric/index.js";

/** Where a search for the lowest value ended. */
export interface Lowest {
  readonly estimates: Float64Array;
  /** Sum of squares, or twice the negative log-likelihood. */
  readonly value: number;
  readonly stop: StopReason;
  readonly evaluations: number;
}

/**
 * What a fit makes as low as it can: a sum of squares, or twice a negative log-likelihood. Profiles, covariances and
 * intervals are worked out on this alone.
 */
export interface Objective {
  readonly size: number;
  readonly value: (at: Float64Array) => number;
  /**
   * Searches from a start; unknowns with equal bounds are held there. A search that stops short is taken up again by
   * other means, unless it has come as low as `enough`.
   */
  readonly minimise: (
    start: Float64Array,
    lower: Float64Array,
    upper: Float64Array,
    enough?: number,
  ) => Lowest;
  /** Slope of the value by unknown i where the last search ended. */
  readonly slope: (i: number) => number;
  /** Fits weights that the objective takes from the optimum itself to a point; says whether one changed. */
  readonly settle?: (at: Float64Array) => boolean;
  /** Inverse of half the second derivatives at the optimum; times `variance` it is the covariance. */
  readonly covariance: (at: Float64Array) => UnscaledCovariance;
}
