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
export { type ExactPath, type ExactPathOptions, type ExactValue, exactPath } from "./exact/exact-path.js";
export { type Attractor, type AttractorOptions, attractor } from "./long-run/attractor.js";
export { type Basin, type Basins, type BasinsOptions, basins } from "./long-run/basins.js";
export { type Cobweb, type CobwebOptions, cobweb } from "./long-run/cobweb.js";
export { type Exponent, type ExponentOptions, exponent } from "./long-run/exponent.js";
export { type Horizon, type HorizonOptions, horizon } from "./long-run/horizon.js";
export { type MatrixGrowth, matrixGrowth } from "./long-run/matrix-growth.js";
export { type NoiseStream, noiseCapacity, noiseStream } from "./noise/noise-stream.js";
export { type GuaranteedDigits, type GuaranteedOptions, guaranteedDigits } from "./path/guaranteed-digits.js";
export { type Path, type PathOptions, type PathStop, path } from "./path/path.js";
export { type Equilibria, type EquilibriaOptions, type Equilibrium, equilibria } from "./rest/equilibria.js";
export type { Multiplier } from "./rest/multiplier.js";
export type { Stability } from "./rest/stability.js";
export type { HeldSetting } from "./setting/held-step.js";
export type { InputValues } from "./setting/input-columns.js";
export type { SearchRange } from "./setting/search-range.js";
export { constantsBySlot, type InitialValues, initialVector } from "./setting/setting.js";
