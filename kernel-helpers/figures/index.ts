export {
  type ChangeFigureOptions,
  type ChangePairs,
  changeFigure,
  type EquilibriumPoint,
} from "./change-figure.js";
export { type CobwebFigureOptions, cobwebFigure } from "./cobweb-figure.js";
export { type FanFigureOptions, type ForecastBand, fanFigure, type ProjectedSeries } from "./fan-figure.js";
export { type Axis, type Figure, type FigureOptions, figure, type Panel } from "./figure.js";
export { type FittedFigureOptions, type FittedSeries, fittedFigure } from "./fitted-figure.js";
export type {
  ArrowLayer,
  BandLayer,
  BarsLayer,
  Layer,
  LineLayer,
  Places,
  PointsLayer,
  ThresholdLayer,
  VerticalLayer,
} from "./layer.js";
export { startPictureWorker } from "./picture-worker-client.js";
export { resetPlotLibrary } from "./plot-library.js";
export { type ProfileCurve, type ProfileFigureOptions, profileFigure } from "./profile-figure.js";
export { type FlaggedValue, type RecordFigureOptions, recordFigure } from "./record-figure.js";
export type { LineSeries, RecordedSeries } from "./recorded-series.js";
export { type AnswerChange, type SensitivityFigureOptions, sensitivityFigure } from "./sensitivity-figure.js";
export { type SmallMultiplesOptions, type SmallSeries, smallMultiples } from "./small-multiples.js";
