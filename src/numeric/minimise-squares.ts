import { type Bounds, boundedStep, holdAtBounds, predictedReduction } from "./bounded-step.js";
import type { LinearisedSystem } from "./linearised-system.js";
import { type SquaresWorkspace, squaresWorkspace } from "./squares-workspace.js";
import type { StopReason } from "./stop-reason.js";
import { scaledLength, trustRegionStep } from "./trust-region-step.js";

/** When the search stops and how far it may reach; every tolerance is relative and has no unit. */
export interface MinimiseOptions {
  /** Where the constants must stay; open when absent. */
  readonly bounds?: Bounds;
  /** Stops when the residuals' part along the Jacobian is below this share of their length; default 1e-10. */
  readonly gradientTolerance?: number;
  /** Stops when a step is below this share of the constants, both scaled; default 1e-13. */
  readonly stepTolerance?: number;
  /** Default 1000. */
  readonly iterationLimit?: number;
  /** First trust radius as a multiple of the scaled length of the start; default 100. */
  readonly reach?: number;
}

/** How the search ended; the constants themselves were moved in place. */
export interface Minimum {
  readonly stop: StopReason;
  readonly sumOfSquares: number;
  readonly iterations: number;
  readonly evaluations: number;
}

const byGradient: StopReason = Object.freeze({ kind: "converged", test: "gradient" });
const byStep: StopReason = Object.freeze({ kind: "converged", test: "step" });
const byReduction: StopReason = Object.freeze({ kind: "converged", test: "reduction" });
const derivativesLost: StopReason = Object.freeze({
  kind: "failed",
  reason: "the derivatives are not finite where the search went",
});
const outOfIterations: StopReason = Object.freeze({ kind: "iteration-limit" });

/** Relative reduction below which rounding, not the model, may decide how the sum of squares changes. */
const refining = 1e-9;
const rounding = 2 * Number.EPSILON;

/**
 * Finds the constants of least sum of squares by the trust-region Levenberg-Marquardt method, moving
 * `constants` [size] in place. A step that does not reduce the sum enough is refused and the trust radius cut;
 * each constant is scaled by the largest column of the Jacobian met, so that units do not matter; bounds are
 * met by an active set. Near the optimum, where rounding hides changes of the sum, undamped steps are taken as
 * long as they shrink.
 *
 * @param workspace - scratch arrays for this size; hand the same one in to allocate nothing per fit.
 * @see Moré (1978), The Levenberg-Marquardt algorithm: implementation and theory; the stop on the residuals'
 *   part along the Jacobian is the relative offset of Bates and Watts (1981), Technometrics 23:179.
 * @example const { stop } = minimiseSquares(system, Float64Array.of(1, 0.5)); // stop.kind === "converged"
 */
export function minimiseSquares(
  system: LinearisedSystem,
  constants: Float64Array,
  options: MinimiseOptions = {},
  workspace: SquaresWorkspace = squaresWorkspace(system.size),
): Minimum {
  const sum = system.evaluate(constants);
  if (!Number.isFinite(sum)) return failed("the model is not finite at the start", sum, 0, 1);
  if (!system.linearise(constants)) return failed("the derivatives are not finite at the start", sum, 0, 1);
  workspace.scale.fill(0);
  growScale(workspace, system.triangle);
  return descend(system, constants, options, workspace, sum);
}

function failed(reason: string, sumOfSquares: number, iterations: number, evaluations: number): Minimum {
  return { stop: Object.freeze({ kind: "failed", reason }), sumOfSquares, iterations, evaluations };
}

function descend(
  system: LinearisedSystem,
  constants: Float64Array,
  options: MinimiseOptions,
  workspace: SquaresWorkspace,
  startSum: number,
): Minimum {
  const {
    bounds,
    gradientTolerance = 1e-10,
    stepTolerance = 1e-13,
    iterationLimit = 1000,
    reach = 100,
  } = options;
  const { scale, step, trial } = workspace;
  const ended = (stop: StopReason): Minimum => ({ stop, sumOfSquares: sum, iterations, evaluations });
  let sum = startSum;
  let evaluations = 1;
  let iterations = 0;
  let extent = scaledLength(scale, constants, system.size);
  let radius = reach * extent || reach;
  let damping = 0;
  let count = prepare(workspace, system, constants, bounds);
  let lastRefinement = Infinity;
  while (offset(workspace, count) > gradientTolerance * Math.sqrt(sum)) {
    if (++evaluations > iterationLimit) return ended(outOfIterations);
    damping = findStep(workspace, system, constants, bounds, count, radius, damping);
    const length = scaledLength(scale, step, system.size);
    if (iterations === 0) radius = Math.min(radius, length);
    for (let j = 0; j < system.size; j++) trial[j] = constants[j]! + step[j]!;
    const trialSum = system.evaluate(trial);
    const actual = trialSum < 100 * sum ? 1 - trialSum / sum : -1;
    const predicted = predictedReduction(system.triangle, system.projected, step, system.size) / sum;
    const refines = damping === 0 && predicted <= refining;
    const ratio = predicted > 0 ? actual / predicted : 0;
    if (ratio <= 0.25) {
      const cut = cutAfter(workspace, system, actual, sum);
      radius = cut * Math.min(radius, 10 * length);
      damping /= cut;
    } else if (damping === 0 || ratio >= 0.75) {
      radius = 2 * length;
      damping *= 0.5;
    }
    if (refines ? actual >= -refining && length < 0.95 * lastRefinement : ratio >= 1e-4) {
      constants.set(trial);
      sum = trialSum;
      iterations++;
      if (!system.linearise(constants)) return ended(derivativesLost);
      growScale(workspace, system.triangle);
      extent = scaledLength(scale, constants, system.size);
      count = prepare(workspace, system, constants, bounds);
      if (refines) lastRefinement = length;
    } else if (refines) return ended(byReduction);
    if ((refines && length <= stepTolerance * extent) || radius <= stepTolerance * extent)
      return ended(byStep);
    if (predicted <= rounding && Math.abs(actual) <= rounding && ratio <= 2) return ended(byReduction);
  }
  return ended(byGradient);
}

/** The triangle of the constants that may move; returns how many they are. */
function prepare(
  workspace: SquaresWorkspace,
  system: LinearisedSystem,
  constants: Float64Array,
  bounds: Bounds | undefined,
): number {
  if (bounds !== undefined)
    return holdAtBounds(workspace, system.triangle, system.projected, constants, bounds);
  workspace.triangle.set(system.triangle);
  workspace.projected.set(system.projected);
  workspace.freeScale.set(workspace.scale);
  return system.size;
}

function findStep(
  workspace: SquaresWorkspace,
  system: LinearisedSystem,
  constants: Float64Array,
  bounds: Bounds | undefined,
  count: number,
  radius: number,
  damping: number,
): number {
  if (bounds !== undefined) {
    return boundedStep(workspace, system, constants, bounds, count, radius, damping);
  }
  const used = trustRegionStep(workspace, count, radius, damping);
  workspace.step.set(workspace.freeStep);
  return used;
}

/** Length of the residuals' part along the Jacobian of the constants that may move. */
function offset(workspace: SquaresWorkspace, count: number): number {
  let sum = 0;
  for (let i = 0; i < count; i++) sum += workspace.projected[i]! ** 2;
  return Math.sqrt(sum);
}

/** By how much to cut the radius: to where the parabola through both sums and the slope is lowest. */
function cutAfter(
  workspace: SquaresWorkspace,
  system: LinearisedSystem,
  actual: number,
  sum: number,
): number {
  if (actual >= 0) return 0.5;
  const { triangle, projected, size } = system;
  let slope = 0;
  for (let i = 0; i < size; i++) {
    for (let j = i; j < size; j++) slope += projected[i]! * triangle[i * size + j]! * workspace.step[j]!;
  }
  const cut = (0.5 * slope) / (slope + 0.5 * actual * sum);
  return actual <= -1 || !(cut > 0.1) ? 0.1 : Math.min(cut, 0.5);
}

/** Scales never shrink, so that a constant that once mattered does not run away where it matters less. */
function growScale(workspace: SquaresWorkspace, triangle: Float64Array): void {
  const { scale, size } = workspace;
  for (let j = 0; j < size; j++) {
    let sum = 0;
    for (let i = 0; i <= j; i++) sum += triangle[i * size + j]! ** 2;
    scale[j] = Math.max(scale[j]!, Math.sqrt(sum)) || 1;
  }
}
