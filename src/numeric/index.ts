export { choleskyFactor, choleskyInverse, choleskySolve } from "./cholesky.js";
export { covarianceFromTriangle, type UnscaledCovariance } from "./covariance-from-triangle.js";
export {
  chiSquareCdf,
  chiSquareQuantile,
  fCdf,
  fQuantile,
  normalCdf,
  normalDensity,
  normalQuantile,
  studentCdf,
  studentQuantile,
} from "./distributions.js";
export { findRoot, type RootOptions } from "./find-root.js";
export { type LeastSquaresProblem, type LeastSquaresSolution, leastSquares } from "./least-squares.js";
export type { LinearisedSystem } from "./linearised-system.js";
export { logGamma } from "./log-gamma.js";
export { type LowestValue, minimise } from "./minimise.js";
export { type MinimiseOptions, type Minimum, minimiseSquares } from "./minimise-squares.js";
export { ModelError } from "./model-error.js";
export { editDistance, nearestNames } from "./nearest-names.js";
export { quantile } from "./quantile.js";
export { type RandomStream, randomStream } from "./random-stream.js";
export { rotateRowIn } from "./rotate-row-in.js";
export { secondDerivatives } from "./second-derivatives.js";
export { type SquaresWorkspace, squaresWorkspace } from "./squares-workspace.js";
export type { StopReason } from "./stop-reason.js";
export type { Warning } from "./warning.js";
