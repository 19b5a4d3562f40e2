export { choleskyFactor, choleskyInverse, choleskySolve } from "./algebra/cholesky.js";
export { covarianceFromTriangle, type UnscaledCovariance } from "./algebra/covariance-from-triangle.js";
export { rotateRowIn } from "./algebra/rotate-row-in.js";
export { freezeDeep, frozenCopy } from "./freeze-deep.js";
export {
  type LeastSquaresProblem,
  type LeastSquaresSolution,
  leastSquares,
} from "./least-squares/least-squares.js";
export type { LinearisedSystem } from "./least-squares/linearised-system.js";
export { type MinimiseOptions, type Minimum, minimiseSquares } from "./least-squares/minimise-squares.js";
export { type SquaresWorkspace, squaresWorkspace } from "./least-squares/squares-workspace.js";
export { ModelError } from "./model-error.js";
export { didYouMean, editDistance, nearestNames } from "./nearest-names.js";
export type { Distribution } from "./probability/distribution.js";
export { type Distributions, distributions } from "./probability/distributions.js";
export { gammaDraw } from "./probability/gamma-draw.js";
export { logGamma } from "./probability/log-gamma.js";
export { normalCdf, normalDensity, normalUpperTail } from "./probability/normal.js";
export { poissonDraw } from "./probability/poisson-draw.js";
export { quantile } from "./probability/quantile.js";
export { type RandomStream, randomStream } from "./probability/random-stream.js";
export {
  chiSquareCdf,
  chiSquareQuantile,
  chiSquareUpperTail,
  fCdf,
  fQuantile,
  fUpperTail,
  normalQuantile,
  studentCdf,
  studentQuantile,
} from "./probability/test-distributions.js";
export { seededWords } from "./probability/xoshiro.js";
export { type RunHooks, reporter, type Tick, ticker } from "./run-hooks.js";
export { loadResult, saveResult } from "./saved-result.js";
export { findRoot, type RootOptions } from "./search/find-root.js";
export { type LowestValue, minimise } from "./search/minimise.js";
export { secondDerivatives } from "./search/second-derivatives.js";
export type { StopReason } from "./search/stop-reason.js";
export type { Warning } from "./warning.js";
