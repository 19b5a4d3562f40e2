export { type Fit, fit } from "./fit.js";
export { type GridIntervalOptions, gridInterval } from "./intervals/grid-interval.js";
export type { Interval } from "./intervals/interval.js";
export type { ErrorDistribution, ErrorKind, FitOptions } from "./options/fit-options.js";
export {
  type Bootstrap,
  type BootstrapOptions,
  type BootstrapRow,
  bootstrap,
} from "./resampling/bootstrap.js";
export { type Resampler, resampler } from "./resampling/resampler.js";
export type { Criteria } from "./result/criteria.js";
export type { Estimate } from "./result/estimate-of.js";
export type { FitPoint } from "./result/fit-points.js";
export type { GroupFit } from "./result/group-fit.js";
export {
  type EstimateRow,
  estimates,
  type PointRow,
  points,
  type SummaryRow,
  summary,
} from "./result/views.js";
export type { FitRows } from "./rows/fit-rows.js";
export { type SecondOpinion, secondOpinion } from "./second-opinion.js";
export { normalEquations } from "./systems/normal-equations.js";
export { type Prepared, prepared } from "./systems/prepared.js";
export { type Unknowns, unknownsOf } from "./unknowns/unknowns.js";
export { type EstimateChange, type UpdatedFit, updateFit } from "./update-fit.js";
