import type { StopReason, Warning } from "../../numeric/index.js";
import type { Filtered } from "../state-space/filtered.js";
import type { Criteria } from "./criteria.js";
import type { Estimate } from "./estimate-of.js";
import type { FitPoint } from "./fit-points.js";
import type { FitUse } from "./fit-use.js";
import type { Overdispersion } from "./overdispersion.js";

/** The fit of one group of a record. */
export interface GroupFit {
  readonly group: string;
  readonly estimates: readonly Estimate[];
  /** [unknowns, unknowns], row-major, by sigma^2 = RSS/(n - p); NaN where not determined. */
  readonly covariance: readonly number[];
  /** Every parameter of the rule at its estimate or its given value. */
  readonly parameters: Readonly<Record<string, number>>;
  /** Initial states of a trajectory fit (period 0); of a one-step fit the first recorded values. */
  readonly initial: Readonly<Record<string, number>>;
  readonly sumOfSquares: number;
  /** n: values compared. */
  readonly count: number;
  /** n - p. */
  readonly degreesOfFreedom: number;
  /** sqrt(RSS/(n - p)), on the fitting scale. */
  readonly sigma: number;
  /** Absent where groups are fitted together: the fit has one for all of them. */
  readonly criteria?: Criteria;
  /** Critical value of the profile's increase. */
  readonly cut: number;
  readonly stop: StopReason;
  readonly points: readonly FitPoint[];
  /** What of the record was used, and how it weighed. */
  readonly used: FitUse;
  /** Other optima within 2 log-likelihood units: their estimates, and by how much they lie behind. */
  readonly rivals: readonly { readonly estimates: readonly number[]; readonly behind: number }[];
  /** Of a fit with both kinds of error. */
  readonly filter?: Filtered;
  /** Of a Poisson fit: whether the counts scatter more than that. */
  readonly overdispersion?: Overdispersion;
  readonly warnings: readonly Warning[];
}
