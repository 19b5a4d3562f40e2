/**
 * The residuals of a fit, one at a time, each with its row of derivatives.
 *
 * `prepare` takes the unknowns; `residualAt(i)` then gives observed minus fitted on the fitting scale and, when
 * derivatives were asked for, fills `row` with d residual / d unknown.
 */
export interface ResidualRows {
  /** How many unknowns. */
  readonly size: number;
  /** How many residuals. */
  readonly count: number;
  /** [size], of the residual last asked for. */
  readonly row: Float64Array;
  prepare(unknowns: Float64Array, needRows: boolean): void;
  residualAt(i: number): number;
  /** The fitted value in the record's own unit, of the residual last asked for. */
  fitted(): number;
}
