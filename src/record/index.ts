export type { Finding } from "./finding.js";
export type { Observations, ObservedGroup, ObservedState, StepLength } from "./observations.js";
