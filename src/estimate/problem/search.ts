import type { RandomStream, Warning } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Criteria } from "../result/criteria.js";
import type { Overdispersion } from "../result/overdispersion.js";
import type { FitRows } from "../rows/fit-rows.js";
import type { Cut } from "../search/cut.js";
import type { Objective } from "../search/objective.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import type { ErrorFamily } from "./error-family.js";
import type { Scale } from "./scale.js";

/** How a fit looks for its unknowns. */
export type FitKind = "least-squares" | "likelihood" | "state-space";

/** What follows from an optimum beside its unknowns. */
export interface Measures {
  readonly criteria: Criteria;
  /** Standard deviation of an error of weight 1; undefined where the residuals' own is meant, or there are several. */
  readonly sigma: number | undefined;
  /** Of a Poisson fit. */
  readonly overdispersion?: Overdispersion;
  /** Of groups fitted together: values and unknowns of all. */
  readonly together?: { readonly values: number; readonly unknowns: number };
  /** Whether intervals and errors are those of n - p degrees of freedom (least squares), or of large samples. */
  readonly exact: boolean;
}

/**
 * What one search fits: a group on its own. Every kind of fit is one of these, so that profiles, resampling and
 * residuals need not know which.
 */
export interface Search {
  readonly kind: FitKind;
  readonly group: ObservedGroup;
  readonly scale: Scale;
  readonly unknowns: Unknowns;
  /** The values compared. */
  readonly rows: FitRows;
  readonly objective: Objective;
  /** The objective over compared values `from` to `end` - 1 only; undefined where they cannot be taken apart. */
  readonly part?: (from: number, end: number) => Objective;
  /** Where searches begin, best first; empty where the rule stays finite nowhere. */
  readonly starts: () => readonly Float64Array[];
  readonly cutAt: (value: number) => Cut;
  readonly measures: (at: Float64Array, value: number) => Measures;
  /** How single values scatter; undefined where a filter has variances of its own for each of them. */
  readonly family: ErrorFamily | undefined;
  /** Spread of the family at unknowns, `sigma` being that of the residuals. */
  readonly spreadAt: (at: Float64Array, sigma: number) => number;
  /** Of a filter: errors of its predictions over their standard deviations, [values compared]. */
  readonly standardised?: (at: Float64Array) => Float64Array;
  /**
   * Finds again what weights rest on, after the record was given other values: of a robust fit the scale in which "far
   * off" is measured, of steps over gaps the rule's slopes.
   */
  readonly settle?: (from: Float64Array) => Float64Array;
  /** Of a robust fit: how much each value counts, [count], beside its own weight. */
  readonly weightsAt?: (at: Float64Array) => Float64Array;
  /** What a reader must know that only this kind of fit can say. */
  readonly warnings?: (at: Float64Array) => readonly Warning[];
  /** A record drawn at unknowns, values [rows of the group, states], own unit; absent where none can be drawn. */
  readonly draw?: (at: Float64Array, sigma: number, stream: RandomStream) => Float64Array;
  /** A record with given errors on the fitting scale, [values compared]. */
  readonly disturbed?: (at: Float64Array, errors: Float64Array) => Float64Array;
}
