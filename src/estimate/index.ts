export { type Fit, fit, problemOf } from "./fit.js";
export { type CommonParameters, testWords } from "./fits/common-parameters.js";
export { type GridIntervalOptions, gridInterval } from "./intervals/grid-interval.js";
export type { Interval } from "./intervals/interval.js";
export type { ErrorDistribution, ErrorKind, FitOptions } from "./options/fit-options.js";
export type { Around } from "./problem/around.js";
export type { Beginning } from "./problem/beginning.js";
export type { ComparedValue } from "./problem/error-family.js";
export type { FitProblem, RefitChanges } from "./problem/fit-problem.js";
export type { GroupProblem } from "./problem/group-problem.js";
export type { Held } from "./problem/held.js";
export type { FittedNoise, FittedScatter } from "./problem/noise.js";
export type { RecordDraw, Refitter } from "./problem/refitter.js";
export type { ResidualKind } from "./problem/residuals.js";
export type { Scale } from "./problem/scale.js";
export type { FitKind } from "./problem/search.js";
export {
  type Bootstrap,
  type BootstrapOptions,
  type BootstrapRow,
  bootstrap,
} from "./resampling/bootstrap.js";
export type { Criteria } from "./result/criteria.js";
export type { Estimate } from "./result/estimate-of.js";
export type { FitPoint } from "./result/fit-points.js";
export type { GroupFit } from "./result/group-fit.js";
export {
  type EstimateRow,
  estimates,
  freeUnknowns,
  type PointRow,
  points,
  type SummaryRow,
  summary,
} from "./result/views.js";
export { type SecondOpinion, secondOpinion } from "./second-opinion.js";
export { type EstimateChange, type UpdatedFit, updateFit } from "./update-fit.js";
