export type { AcrossUnits } from "./across-units.js";
export type { DeltaMargin } from "./delta-margin.js";
export type { GroupReach, Reach, ReachOptions } from "./reach.js";
export { reaches } from "./reaches.js";
