export type { Direction } from "./crossing.js";
export { type GroupReach, type Reach, type ReachOptions, reaches } from "./reaches.js";
