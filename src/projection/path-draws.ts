/** Paths drawn for a projection, by state in the rule's order; each [paths, periods + 1], row-major. */
export interface PathDraws {
  readonly paths: number;
  readonly periods: number;
  /** Parameters drawn, no further error. Empty for a simulation at given parameters. */
  readonly mean: readonly Float64Array[];
  /** The same parameters, with process errors on the way or a reading's error on top. NaN once a path has ended. */
  readonly future: readonly Float64Array[];
  /** Draws thrown away because a parameter left its bounds. */
  readonly discarded: number;
}
