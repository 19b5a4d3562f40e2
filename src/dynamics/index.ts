export { type Draws, type DrawsOptions, draws } from "./draws.js";
export { type Equilibria, type EquilibriaOptions, type Equilibrium, equilibria } from "./equilibria.js";
export type { HeldSetting } from "./held-step.js";
export type { InputValues } from "./input-columns.js";
export type { Multiplier } from "./multiplier.js";
export { type Path, type PathOptions, type PathStop, path } from "./path.js";
export type { SearchRange } from "./search-range.js";
export { constantsBySlot, type InitialValues, initialVector } from "./setting.js";
export type { Stability } from "./stability.js";
