import type { InputPlans } from "../dynamics/index.js";
import type { Warning } from "../numeric/index.js";
import type { PeriodAxis } from "../record/index.js";
import type { Band } from "./ensemble/band.js";
import type { Growth } from "./ensemble/growth.js";
import type { WatchedPassage } from "./ensemble/placed-watches.js";
import type { PathDraws } from "./path-draws.js";
import type { Predictability } from "./predictability.js";

/** One state of a projection. All series run over the group's `index`. */
export interface ProjectedState {
  readonly state: string;
  readonly unit: string;
  /** The path at the estimates, or at the given parameters, without random change; NaN after it has left its range. */
  readonly central: readonly number[];
  /** The middle of the drawn paths that carry every error. */
  readonly median: readonly number[];
  /** In the state's unit. */
  readonly bands: readonly Band[];
  /** Of a simulation under random change: how a typical path grows. */
  readonly growth?: Growth;
  /** Where the record reads the state through a factor: what it would read, in the record's own unit. */
  readonly observed?: ProjectedIndex;
}

/** A state as the record would read it, through a factor. */
export interface ProjectedIndex {
  readonly factor: string;
  readonly unit: string;
  /** The factor's estimate times the path at the estimates. */
  readonly central: readonly number[];
  readonly bands: readonly Band[];
}

/** One group of a record, or one scenario of inputs, carried forward. */
export interface GroupForecast {
  /** "" where there is a single group. */
  readonly group: string;
  /** "" where there is a single scenario. */
  readonly scenario: string;
  /** The plans of inputs that it stands on. */
  readonly plans: InputPlans;
  /** The axis of its periods: `labelAt(axis, index)` names one. */
  readonly axis: PeriodAxis;
  /** Indexes on the axis: from period 0 for a trajectory fit, from the last recorded one for a one-step fit. */
  readonly index: readonly number[];
  /** The period column's values there. */
  readonly time: readonly number[];
  /** The labels there, where periods are not mere numbers. */
  readonly labels?: readonly string[];
  /** Step index of the last recorded value; of the first value in a simulation. */
  readonly recordEnd: number;
  readonly states: readonly ProjectedState[];
  readonly ensemble: PathDraws;
  /** First passages of what was watched. */
  readonly passages: readonly WatchedPassage[];
  /** Share of paths that had left their range by the end, and its Monte-Carlo error. */
  readonly left: number;
  readonly leftError: number;
  /** How far ahead a single path means anything; absent where inputs or the period index drive the rule. */
  readonly predictability?: Predictability;
  readonly warnings: readonly Warning[];
}
