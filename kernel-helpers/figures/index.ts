export { warmPictures } from "./draw-picture.js";
export { type Axis, type Figure, type FigureOptions, figure, type Panel } from "./figure.js";
export { libraryAgain } from "./figure-library.js";
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
