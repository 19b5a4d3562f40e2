export type { AcrossUnits } from "./across-units.js";
export { amount } from "./amount.js";
export { type Best, type BestOptions, best } from "./best.js";
export type { DeltaMargin } from "./delta-margin.js";
export type { Measure } from "./measure.js";
export {
  type NextReading,
  type NextReadingOptions,
  nextReading,
  type ReadingChoice,
} from "./next-reading.js";
export type { GroupReach, Reach, ReachOptions } from "./reach.js";
export { reaches } from "./reaches.js";
export {
  type Sensitivity,
  type SensitivityOptions,
  type SensitivityRow,
  sensitivity,
} from "./sensitivity.js";
export type { Solution, Solved, SolveOptions, Target } from "./solution.js";
export { solveFor } from "./solve-for.js";
export { type Tradeoff, type TradeoffOptions, tradeoff } from "./tradeoff.js";
