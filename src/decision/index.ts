export { type OptimizeOptions, type Optimum, optimize } from "./choice/optimize.js";
export {
  type Sensitivity,
  type SensitivityOptions,
  type SensitivityRow,
  sensitivity,
} from "./choice/sensitivity.js";
export type { DatedTarget, Jump, Solution, Solved, SolveOptions, Target } from "./choice/solution.js";
export { solveFor } from "./choice/solve-for.js";
export { type Tradeoff, type TradeoffOptions, type TradeoffRow, tradeoff } from "./choice/tradeoff.js";
export type { Measure } from "./measure/measure.js";
export type { AcrossUnits } from "./reach/across-units.js";
export type { DeltaMargin } from "./reach/delta-margin.js";
export type { GroupReach, TimeToReach, TimeToReachOptions } from "./reach/reach.js";
export { target as reachedLevel } from "./reach/reach-sentence.js";
export { timeToReach } from "./reach/time-to-reach.js";
export {
  type NextReading,
  type NextReadingOptions,
  nextReading,
  type ReadingChoice,
} from "./reading/next-reading.js";
