export { ModelError } from "./model-error.js";
export type { Warning } from "./warning.js";
