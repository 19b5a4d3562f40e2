export type { Bounds } from "./bounded-step.js";
export type { LinearisedSystem } from "./linearised-system.js";
export { type MinimiseOptions, type Minimum, minimiseSquares } from "./minimise-squares.js";
export { ModelError } from "./model-error.js";
export { type SquaresWorkspace, squaresWorkspace } from "./squares-workspace.js";
export type { StopReason } from "./stop-reason.js";
export type { Warning } from "./warning.js";
