export { groupRequiredError } from "./errors.js";
export { type EstimatedValues, type Fit, type GroupFit, withEstimates } from "./fit-shortcuts.js";
export { groupName, groupNamed } from "./group-named.js";
export type { ChangePoint, Check, CompareOptions, Proposal, UpdatedFit } from "./holding-fits.js";
export {
  type Forecast,
  forecastWithValues,
  type ProjectedGroup,
  type Simulation,
  simulationWithValues,
} from "./projection-shortcuts.js";
export { type TimeToReach, withSingleReach } from "./reach-shortcuts.js";
export { type Observations, withLast } from "./record-shortcuts.js";
