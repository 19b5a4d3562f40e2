export { type Check, type CheckOptions, check, type GroupCheck } from "./check/check.js";
export type { ErrorAdvice } from "./check/error-advice.js";
export type { RecoveredUnknown, Recovery } from "./check/recovery.js";
export type { ResidualTest } from "./check/residual-tests.js";
export type { Window } from "./check/windows.js";
export { type Comparison, type ComparisonRow, compare } from "./compare.js";
