export type {
  Measure,
  NextReading,
  NextReadingOptions,
  OptimizeOptions,
  Optimum,
  Sensitivity,
  SensitivityOptions,
  Solved,
  SolveOptions,
  Target,
  TimeToReachOptions,
  Tradeoff,
  TradeoffOptions,
} from "../src/decision/index.js";
export type {
  Attractor,
  AttractorOptions,
  Basins,
  BasinsOptions,
  Bifurcations,
  BifurcationsOptions,
  ClosedForm,
  ClosedFormOptions,
  Cobweb,
  CobwebOptions,
  Cycles,
  CyclesOptions,
  Equilibria,
  EquilibriaOptions,
  ExactTrajectory,
  ExactTrajectoryOptions,
  HeldSetting,
  InputPlan,
  LyapunovExponent,
  LyapunovExponentOptions,
  MatrixGrowth,
  PredictionHorizon,
  PredictionHorizonOptions,
  Trajectory,
  TrajectoryOptions,
} from "../src/dynamics/index.js";
export type {
  Bootstrap,
  BootstrapOptions,
  Estimate,
  EstimateChange,
  FitOptions,
  GridIntervalOptions,
  Interval,
} from "../src/estimate/index.js";
export type {
  ChangePointOptions,
  CheckOptions,
  Comparison,
  DensityDependence,
  DensityOptions,
  ProposeOptions,
  SameParameters,
} from "../src/evidence/index.js";
export { type Distribution, type Distributions, distributions, ModelError } from "../src/numeric/index.js";
export type {
  ForecastOptions,
  SimulateOptions,
} from "../src/projection/index.js";
export type {
  Correction,
  Decision,
  DifferenceOptions,
  Differences,
  Finding,
  ObservationOptions,
} from "../src/record/index.js";
export type { ReadOptions, WriteOptions } from "../src/store/index.js";
export { frame, type RecordLike, sourceOf } from "./dataframe/index.js";
export { type Figure, type FigureOptions, figure } from "./figures/index.js";
export { answer, type CaseOptions, closeCase, openCase } from "./functions/case.js";
export type { Domain } from "./functions/cautions.js";
export { changePoint, densityDependence } from "./functions/change-points.js";
export { check } from "./functions/checks.js";
export { optimize, sensitivity, tradeoff } from "./functions/choices.js";
export { compare } from "./functions/comparisons.js";
export { correct, type DecisionsLog, decisionsLog, undo } from "./functions/corrections.js";
export { nextReading, solveFor, timeToReach } from "./functions/decisions.js";
export {
  attractor,
  basins,
  bifurcations,
  closedForm,
  cobweb,
  cycles,
  equilibria,
  exactTrajectory,
  lyapunovExponent,
  matrixGrowth,
  predictionHorizon,
  trajectory,
} from "./functions/dynamics.js";
export { type Explanation, explain } from "./functions/explain.js";
export { estimates, fit, points, summary } from "./functions/fits.js";
export { expanding, fill, longer, rolling, shift, toPeriods, wider } from "./functions/frames.js";
export { leastSquares } from "./functions/least-squares.js";
export { numberFormat } from "./functions/number-format.js";
export { forecast, simulate } from "./functions/projections.js";
export { propose } from "./functions/proposals.js";
export {
  differences,
  observations,
  readRecord,
  writeRecord,
} from "./functions/records.js";
export { bootstrap, gridInterval, updateFit } from "./functions/resampling.js";
export {
  type RecurrenceOptions,
  type Rule,
  type RuleCatalogue,
  recurrence,
  rules,
} from "./functions/rules.js";
export { sameParameters } from "./functions/same-parameters.js";
export { loadResult, saveResult } from "./functions/saved.js";
export { show } from "./functions/show.js";
export type { Term } from "./glossary/index.js";
export { type Progress, progress, withProgress } from "./progress/index.js";
export type {
  ChangePoint,
  Check,
  CompareOptions,
  Fit,
  Forecast,
  GroupFit,
  Observations,
  Proposal,
  Simulation,
  TimeToReach,
  UpdatedFit,
} from "./results/index.js";
export {
  type NumberFormat,
  type Table,
  type TableOptions,
  table,
  tabSeparated,
} from "./tables/index.js";
