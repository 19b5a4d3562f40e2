/**
 * The values that a fit compares, one at a time, each with its fitted value and row of derivatives.
 *
 * `prepare` takes the unknowns; `residualAt(i)` then gives observed minus fitted on the fitting scale, times the root
 * of the value's weight, and, when derivatives were asked for, fills `row` with d residual / d unknown.
 */
export interface FitRows {
  /** How many unknowns. */
  readonly size: number;
  /** How many values are compared. */
  readonly count: number;
  /** [size], of the value last asked for. */
  readonly row: Float64Array;
  /** [count]: its row in the group, and the number of its state. */
  readonly entries: Int32Array;
  readonly states: Int32Array;
  /** [count]: in the record's own unit. */
  readonly observed: Float64Array;
  /** [count]: roots of the weights. */
  readonly roots: Float64Array;
  prepare(unknowns: Float64Array, needRows: boolean): void;
  residualAt(i: number): number;
  /** The fitted value in the record's own unit, of the value last asked for. */
  fitted(): number;
  /** Puts other values [rows of the group, states] in the record's place. */
  take(values: Float64Array): void;
  /** Of one-step fits: puts one value in the place of compared value i, from which later ones are then stepped to. */
  readonly put?: (i: number, value: number) => void;
  /**
   * Of one-step fits over gaps: gives `roots` the weights that follow from the rule's slopes at the unknowns; says whether
   * one changed. Before, every step over a gap counts as if its error were carried on as it is.
   */
  readonly reweigh?: (unknowns: Float64Array) => boolean;
}
