export {
  type ChangePoint,
  type ChangePointOptions,
  changePoint,
} from "./change-point/change-point.js";
export type { GroupChangePoint } from "./change-point/group-change-point.js";
export { type Check, type CheckOptions, check, type GroupCheck } from "./check/check.js";
export type { ErrorAdvice } from "./check/error-advice.js";
export type { RecoveredUnknown, Recovery } from "./check/recovery.js";
export type { ResidualTest } from "./check/residual-tests.js";
export type { Window } from "./check/windows.js";
export { type CompareOptions, type Comparison, compare, type RivalDecision } from "./compare/compare.js";
export type { ComparisonRow } from "./compare/comparison-row.js";
export type { LikelihoodRatio } from "./compare/likelihood-ratio.js";
export { type SameParameters, sameParameters } from "./compare/same-parameters.js";
export {
  type DensityDependence,
  type DensityOptions,
  densityDependence,
  type GroupDensity,
} from "./density-dependence.js";
export type { ForecastScores } from "./forecasts/forecast-scores.js";
export type { RollingOrigin } from "./forecasts/rolling-origin.js";
export { type Proposal, type ProposedRule, type ProposeOptions, propose } from "./propose/propose.js";
