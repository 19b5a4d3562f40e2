import { covarianceFromTriangle } from "../algebra/covariance-from-triangle.js";
import { freezeDeep } from "../freeze-deep.js";
import { badBounds, badStart, otherNumberOf, tooFewResiduals } from "../refusals.js";
import type { StopReason } from "../search/stop-reason.js";
import { type Minimum, minimiseSquares } from "./minimise-squares.js";
import { type ResidualSystem, residualSystem } from "./residual-system.js";

/** A least-squares problem stated by its residuals. */
export interface LeastSquaresProblem {
  /** Residuals [rows] at parameters [size]; NaN where the model is not defined. */
  readonly residuals: (parameters: Float64Array) => ArrayLike<number>;
  /** Derivative of every residual by every parameter, row-major [rows, size]; default central differences. */
  readonly jacobian?: (parameters: Float64Array) => ArrayLike<number>;
  /** Values of the parameters where the search begins. */
  readonly start: ArrayLike<number>;
  /** Lowest admitted values; a parameter with equal limits is held there; default no limit. */
  readonly lower?: ArrayLike<number>;
  /** Highest admitted values; a parameter with equal limits is held there; default no limit. */
  readonly upper?: ArrayLike<number>;
  /** Typical size of each parameter, for difference steps about 0; default its own value. */
  readonly scale?: ArrayLike<number>;
}

/** The parameters of least sum of squares, how well they are known, and why the search stopped. */
export interface LeastSquaresSolution {
  readonly kind: "least-squares";
  readonly estimates: Float64Array;
  /** In the units of the parameters; undefined = not determined by these residuals. */
  readonly standardErrors: readonly (number | undefined)[];
  /** Row-major [size, size]; NaN where not determined. */
  readonly covariance: Float64Array;
  readonly residuals: Float64Array;
  readonly sumOfSquares: number;
  /** sumOfSquares / (rows - parameters not held); undefined when no residual is left over. */
  readonly variance: number | undefined;
  /** Number of parameters, or combinations of them, that the residuals determine at the solution. */
  readonly rank: number;
  readonly stop: StopReason;
  /** Calls of the residual function, those for differences included. */
  readonly evaluations: number;
}

/**
 * First steps allowed, as multiples of the scaled length of the start. A wide reach is fast; a narrow one does
 * not leap over the optimum into a region where the model no longer answers. The lowest sum is kept.
 */
const reaches = [100, 1, 0.1];

/**
 * Finds the parameters that minimise the sum of squared residuals.
 *
 * Minimises S(c) = sum_i r_i(c)^2 by a trust-region Levenberg-Marquardt search (`minimiseSquares`) on a QR
 * factorisation, from the start with several first step lengths. Without a Jacobian, central differences
 * relative to the parameters are used, extrapolated at the end, so that data in any units give the same digits.
 * Covariance is s^2 (J'J)^-1 with s^2 = S/(rows - size); a parameter that J does not determine has none.
 *
 * @throws {ModelError} `too-few-residuals`, `bad-start`, `bad-bounds`, `other-number-of-parameters`,
 *   `residuals-of-other-length`, `jacobian-of-other-shape`.
 * @see Moré (1978); Bates and Watts (1988), Nonlinear Regression Analysis and Its Applications, chapter 2.
 * @example
 * const x = [1, 2, 3], y = [2, 4, 6];
 * leastSquares({ residuals: ([slope]) => y.map((value, i) => value - slope! * x[i]!), start: [1] }).estimates[0]; // 2
 */
export function leastSquares(problem: LeastSquaresProblem): LeastSquaresSolution {
  const start = Float64Array.from(problem.start);
  const size = start.length;
  const lower = optional(problem.lower, "lower", size, Number.NEGATIVE_INFINITY);
  const upper = optional(problem.upper, "upper", size, Number.POSITIVE_INFINITY);
  const scale = optional(problem.scale, "scale", size, 0);
  for (let j = 0; j < size; j++) {
    if (!Number.isFinite(start[j]!)) throw badStart(j, start[j]!);
    if (!(lower[j]! <= upper[j]!)) throw badBounds(j, lower[j]!, upper[j]!);
    start[j] = Math.min(Math.max(start[j]!, lower[j]!), upper[j]!);
  }
  const rows = problem.residuals(start.slice()).length;
  if (rows < size) throw tooFewResiduals(rows, size);
  const { residuals, jacobian } = problem;
  const system = residualSystem({ residuals, jacobian, rows, lower, upper, scale });
  const held = lower.filter((bound, j) => bound === upper[j]).length;
  return solution(system, lowest(system, start, lower, upper), rows - size + held);
}

function optional(
  given: ArrayLike<number> | undefined,
  what: string,
  size: number,
  open: number,
): Float64Array {
  if (given === undefined) return new Float64Array(size).fill(open);
  if (given.length !== size) throw otherNumberOf(what, size, given.length);
  return Float64Array.from(given);
}

function lowest(
  system: ResidualSystem,
  start: Float64Array,
  lower: Float64Array,
  upper: Float64Array,
): Minimum {
  system.chooseSteps(start, false);
  const bounded = lower.some(Number.isFinite) || upper.some(Number.isFinite) ? { lower, upper } : {};
  const found = reaches.map((reach) => minimiseSquares(system, start, { ...bounded, reach }));
  const best = found.reduce((low, next) => (next.sumOfSquares < low.sumOfSquares ? next : low));
  system.chooseSteps(best.estimates, true);
  return minimiseSquares(system, best.estimates, { ...bounded, reach: 1 });
}

function solution(system: ResidualSystem, found: Minimum, left: number): LeastSquaresSolution {
  const { size, triangle } = system;
  system.evaluate(found.estimates);
  const variance = left > 0 ? found.sumOfSquares / left : undefined;
  const { covariance, determined, rank } = covarianceFromTriangle(triangle, size);
  for (let i = 0; i < covariance.length; i++) covariance[i] = covariance[i]! * (variance ?? Number.NaN);
  return freezeDeep({
    kind: "least-squares",
    estimates: found.estimates,
    standardErrors: determined.map((known, i) =>
      known && variance !== undefined ? Math.sqrt(covariance[i * size + i]!) : undefined,
    ),
    covariance,
    residuals: system.residuals.slice(),
    sumOfSquares: found.sumOfSquares,
    variance,
    rank,
    stop: found.stop,
    evaluations: system.evaluations(),
  });
}
