export { type CentralPath, centralPath, type Ground, stateLimits } from "./central-path.js";
export type { Band } from "./ensemble/band.js";
export { blockStreams } from "./ensemble/block-streams.js";
export { type EnsembleRun, runEnsemble, type Starts } from "./ensemble/ensemble.js";
export type { Growth } from "./ensemble/growth.js";
export {
  type CrossedLevel,
  crossedLevel,
  type LevelSide,
  levelSide,
  type Passage,
  passageLog,
  type Watch,
} from "./ensemble/passage.js";
export { type FitGround, fitGround } from "./fit-ground.js";
export { type Forecast, forecast } from "./forecast.js";
export type { ForecastOptions } from "./forecast-options.js";
export type { Scenarios } from "./inputs/scenarios.js";
export { type Noise, type NoiseDraw, noiseDraw } from "./noise/noise.js";
export { ruleNoise } from "./noise/rule-noise.js";
export { type DrawnStarts, drawnStarts, unknownsDraw } from "./parameters/drawn-starts.js";
export type { PathDraws } from "./path-draws.js";
export type { Predictability } from "./predictability.js";
export type { GroupForecast, ProjectedState } from "./projected-group.js";
export { recordedSignWarnings } from "./recorded-sign.js";
export { type SimulateOptions, type Simulation, simulate } from "./simulate.js";
