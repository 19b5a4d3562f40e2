import type { Criteria } from "../result/criteria.js";
import type { Estimate } from "../result/estimate-of.js";
import type { GroupFit } from "../result/group-fit.js";
import type { CommonParameters } from "./common-parameters.js";

/** The groups of a record as they were fitted, and what holds for all of them. */
export interface JointFit {
  readonly groups: readonly GroupFit[];
  /** Of the whole fit. */
  readonly criteria: Criteria;
  /** Of a combined fit: whether the groups have their parameters in common. */
  readonly commonParameters?: CommonParameters;
  /** Of groups fitted together: the parameters that hold for all, or their means and standard deviations among groups. */
  readonly population?: readonly Estimate[];
}
