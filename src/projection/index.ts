export { type CentralPath, centralPath, type Ground } from "./central-path.js";
export type { Band } from "./ensemble/band.js";
export { blockStreams } from "./ensemble/block-streams.js";
export { type EnsembleRow, type EnsembleRun, runEnsemble, type Starts } from "./ensemble/ensemble.js";
export type { Growth } from "./ensemble/growth.js";
export { passageQuestion, type Watch, type WatchedPassage } from "./ensemble/placed-watches.js";
export {
  firstPassage,
  type KeptPaths,
  type Passage,
  type PassageQuestion,
  passageLog,
  pastBy,
} from "./first-passage.js";
export { type FitGround, fitGround } from "./fit-ground.js";
export { type Forecast, forecast } from "./forecast.js";
export type { ForecastOptions } from "./forecast-options.js";
export type { Scenarios } from "./inputs/scenarios.js";
export {
  type CrossedLevel,
  centralLevels,
  checkLevel,
  crossedLevel,
  type Level,
  type LevelSide,
  type LevelSource,
  levelSide,
  levelSource,
  levelValues,
  placeOf,
  sameLevel,
  startNames,
} from "./levels.js";
export { type Noise, type NoiseDraw, noiseDraw } from "./noise/noise.js";
export { ruleNoise } from "./noise/rule-noise.js";
export { type DrawnStarts, drawnStarts, type UnknownsDraw, unknownsDraw } from "./parameters/drawn-starts.js";
export type { PathDraws } from "./path-draws.js";
export type { Predictability } from "./predictability.js";
export type { GroupForecast, ProjectedIndex, ProjectedState } from "./projected-group.js";
export { recordedSignWarnings } from "./recorded-sign.js";
export { type SimulateOptions, type Simulation, simulate } from "./simulate.js";
export { runBounds } from "./state-range.js";
