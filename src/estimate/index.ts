export type { Criteria } from "./criteria.js";
export type { Estimate } from "./estimate-of.js";
export { type Fit, fit } from "./fit.js";
export type { ErrorKind, FitOptions, Spread } from "./fit-options.js";
export type { FitPoint } from "./fit-points.js";
export type { GroupFit } from "./group-fit.js";
export type { Interval } from "./interval.js";
export { type SecondOpinion, secondOpinion } from "./second-opinion.js";
export { type EstimateRow, estimates, points, type SummaryRow, summary } from "./views.js";
