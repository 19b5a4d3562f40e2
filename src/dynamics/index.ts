export { type Attractor, type AttractorOptions, attractor } from "./attractor.js";
export { type Basin, type Basins, type BasinsOptions, basins } from "./basins.js";
export {
  type Bifurcation,
  type Bifurcations,
  type BifurcationsOptions,
  bifurcations,
} from "./bifurcations.js";
export { type ClosedForm, type ClosedFormOptions, closedForm, closedFormAt } from "./closed-form.js";
export { type Cobweb, type CobwebOptions, cobweb } from "./cobweb.js";
export { type Cycle, type Cycles, type CyclesOptions, cycles } from "./cycles.js";
export { type Equilibria, type EquilibriaOptions, type Equilibrium, equilibria } from "./equilibria.js";
export { type ExactPath, type ExactPathOptions, type ExactValue, exactPath } from "./exact/exact-path.js";
export { type Exponent, type ExponentOptions, exponent } from "./exponent.js";
export { type GuaranteedDigits, type GuaranteedOptions, guaranteedDigits } from "./guaranteed-digits.js";
export type { HeldSetting } from "./held-step.js";
export { type Horizon, type HorizonOptions, horizon } from "./horizon.js";
export type { InputValues } from "./input-columns.js";
export type { ClosedTerm } from "./linear/closed-terms.js";
export type { ClosedRoot } from "./linear/polynomial-roots.js";
export { type MatrixGrowth, matrixGrowth } from "./matrix-growth.js";
export type { Multiplier } from "./multiplier.js";
export { type NoiseStream, noiseCapacity, noiseStream } from "./noise/noise-stream.js";
export { type Path, type PathOptions, type PathStop, path } from "./path.js";
export type { SearchRange } from "./search-range.js";
export { constantsBySlot, type InitialValues, initialVector } from "./setting.js";
export type { Stability } from "./stability.js";
