import type { BoundsPassed, KeptPaths } from "./first-passage.js";
import type { LevelSource } from "./levels.js";

/** Paths drawn for a projection, by state in the rule's order; each [paths, periods + 1], row-major. */
export interface PathDraws {
  readonly paths: number;
  readonly periods: number;
  /** Parameters drawn, no further error. Empty for a simulation at given parameters. */
  readonly mean: readonly Float64Array[];
  /** The same parameters, with process errors on the way or an observation's error on top. NaN once a path has ended. */
  readonly future: readonly Float64Array[];
  /** What events are read from, by state and then by quantity: with the errors of the process, without those of observations. */
  readonly process: readonly Float64Array[];
  /** By state: where those paths passed a bound. */
  readonly passed: readonly BoundsPassed[];
  /** The path without random change, by state and then by quantity. */
  readonly central: readonly KeptPaths[];
  /** What levels relative to a parameter or first value are taken of: at the estimates, and for every path. */
  readonly levels: { readonly central: LevelSource; readonly paths: LevelSource };
  /** Draws thrown away because a parameter left its bounds. */
  readonly discarded: number;
}
