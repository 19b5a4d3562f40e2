export {
  type ClosedForm,
  type ClosedFormOptions,
  closedForm,
  closedFormAt,
} from "./closed-form/closed-form.js";
export type { ClosedTerm } from "./closed-form/closed-terms.js";
export type { ClosedRoot } from "./closed-form/polynomial-roots.js";
export {
  type Bifurcation,
  type Bifurcations,
  type BifurcationsOptions,
  bifurcations,
} from "./cycle/bifurcations.js";
export { type Cycle, type Cycles, type CyclesOptions, cycles } from "./cycle/cycles.js";
export {
  type ExactTrajectory,
  type ExactTrajectoryOptions,
  type ExactValue,
  exactTrajectory,
} from "./exact/exact-trajectory.js";
export { type InputPlan, type InputPlans, isByGroup, planOfGroup } from "./inputs/input-plan.js";
export { plannedInputs } from "./inputs/planned-inputs.js";
export { initialFrom, inputsFrom, type RunStart, runStart, type StartOptions } from "./inputs/run-start.js";
export { type Attractor, type AttractorOptions, attractor } from "./long-run/attractor.js";
export { type Basin, type Basins, type BasinsOptions, basins } from "./long-run/basins.js";
export { type Cobweb, type CobwebOptions, cobweb } from "./long-run/cobweb.js";
export {
  type LyapunovExponent,
  type LyapunovExponentOptions,
  lyapunovExponent,
} from "./long-run/lyapunov-exponent.js";
export { type MatrixGrowth, matrixGrowth } from "./long-run/matrix-growth.js";
export {
  type PredictionHorizon,
  type PredictionHorizonOptions,
  predictionHorizon,
} from "./long-run/prediction-horizon.js";
export { type NoiseStream, noiseCapacity, noiseStream } from "./noise/noise-stream.js";
export { type Equilibria, type EquilibriaOptions, type Equilibrium, equilibria } from "./rest/equilibria.js";
export type { Multiplier } from "./rest/multiplier.js";
export type { Stability } from "./rest/stability.js";
export type { HeldSetting } from "./setting/held-step.js";
export type { SearchRange } from "./setting/search-range.js";
export { type InitialValues, initialVector, parametersBySlot } from "./setting/setting.js";
export { type BoundedPath, type BoundReached, boundedPath, type PathRun } from "./trajectory/bounded-path.js";
export {
  type GuaranteedDigits,
  type GuaranteedOptions,
  guaranteedDigits,
} from "./trajectory/guaranteed-digits.js";
export {
  type Absorption,
  type Trajectory,
  type TrajectoryOptions,
  type TrajectoryStop,
  trajectory,
} from "./trajectory/trajectory.js";
