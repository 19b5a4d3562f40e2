export type { LinearisedSystem } from "./linearised-system.js";
export { ModelError } from "./model-error.js";
export type { StopReason } from "./stop-reason.js";
export type { Warning } from "./warning.js";
