export type {
  Best,
  BestOptions,
  Measure,
  NextReading,
  NextReadingOptions,
  Reach,
  ReachOptions,
  Sensitivity,
  SensitivityOptions,
  Solved,
  SolveOptions,
  Target,
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
  ExactPath,
  ExactPathOptions,
  Exponent,
  ExponentOptions,
  HeldSetting,
  Horizon,
  HorizonOptions,
  MatrixGrowth,
  Path,
  PathOptions,
} from "../src/dynamics/index.js";
export {
  type Bootstrap,
  type BootstrapOptions,
  type Estimate,
  type EstimateChange,
  type Extended,
  estimates,
  type Fit,
  type FitOptions,
  type GridIntervalOptions,
  type GroupFit,
  type Interval,
  points,
  summary,
} from "../src/estimate/index.js";
export type {
  ChangePoint,
  ChangePointOptions,
  Check,
  CheckOptions,
  CompareOptions,
  Comparison,
  DensityDependence,
  DensityOptions,
  Proposal,
  ProposeOptions,
} from "../src/evidence/index.js";
export { leastSquares, ModelError } from "../src/numeric/index.js";
export type {
  Forecast,
  ForecastOptions,
  InputPlan,
  SimulateOptions,
  Simulation,
} from "../src/projection/index.js";
export type {
  Correction,
  Decision,
  DifferenceOptions,
  Differences,
  Finding,
  ObservationOptions,
  Observations,
} from "../src/record/index.js";
export type { ReadOptions, WriteOptions } from "../src/store/index.js";
export { answer, type CaseOptions, closeCase, openCase } from "./commands/case.js";
export type { Domain } from "./commands/cautions.js";
export { changePoint, densityDependence } from "./commands/change-points.js";
export { check } from "./commands/checks.js";
export { best, sensitivity, tradeoff } from "./commands/choices.js";
export { compare } from "./commands/comparisons.js";
export { correct, type DecisionsLog, decisionsLog, undo } from "./commands/corrections.js";
export { nextReading, reaches, solveFor } from "./commands/decisions.js";
export {
  attractor,
  basins,
  bifurcations,
  closedForm,
  cobweb,
  cycles,
  equilibria,
  exactPath,
  exponent,
  horizon,
  matrixGrowth,
  path,
} from "./commands/dynamics.js";
export { type Explanation, explain } from "./commands/explain.js";
export { fit } from "./commands/fits.js";
export { expanding, fill, longer, regroup, rolling, shift, wider } from "./commands/frames.js";
export { forecast, simulate } from "./commands/projections.js";
export { propose } from "./commands/proposals.js";
export {
  differences,
  observations,
  readRecord,
  writeRecord,
} from "./commands/records.js";
export { bootstrap, extend, gridInterval } from "./commands/resampling.js";
export {
  type RecurrenceOptions,
  type Rule,
  type RuleCatalogue,
  recurrence,
  rules,
} from "./commands/rules.js";
export { show } from "./commands/show.js";
export { frame, type RecordLike, sourceOf } from "./dataframe/index.js";
export { type Figure, type FigureOptions, figure } from "./figures/index.js";
export type { Term } from "./glossary/index.js";
export { type Progress, progress, withProgress } from "./progress/index.js";
export {
  type NumberFormat,
  numberFormat,
  type Table,
  type TableOptions,
  table,
  tabSeparated,
} from "./tables/index.js";
