import type { StopReason } from "../search/stop-reason.js";
import { type Bounds, within } from "./bounded-step.js";
import type { LinearisedSystem } from "./linearised-system.js";
import { type SquaresWorkspace, squaresWorkspace } from "./squares-workspace.js";
import { type Search, type SearchProblem, settle, tryStep } from "./trust-region-search.js";
import { scaledLength } from "./trust-region-step.js";

/** When the search stops and how far it may reach; every tolerance is relative and has no unit. */
export interface MinimiseOptions {
  /** Lowest and highest admitted values [size]; open when absent. A parameter with equal bounds is held there. */
  readonly lower?: Float64Array;
  readonly upper?: Float64Array;
  /** Stops when the residuals' part along the Jacobian is below this share of their length; default 1e-10. */
  readonly gradientTolerance?: number;
  /** Stops when a step is below this share of the parameters, both scaled; default 1e-13. */
  readonly stepTolerance?: number;
  /** Default 1000. */
  readonly iterationLimit?: number;
  /** First trust radius as a multiple of the scaled length of the start; default 100. */
  readonly reach?: number;
  /** Scratch arrays for this size: hand the same ones in to every fit of many. */
  readonly workspace?: SquaresWorkspace;
}

/** How the search ended, and where. */
export interface Minimum {
  readonly estimates: Float64Array;
  readonly stop: StopReason;
  readonly sumOfSquares: number;
  readonly iterations: number;
  readonly evaluations: number;
}

const outOfIterations: StopReason = Object.freeze({ kind: "iteration-limit" });

/**
 * Finds the parameters of least sum of squares by the trust-region Levenberg-Marquardt method. A step that does not reduce the sum enough is refused and the trust radius cut;
 * each parameter is scaled by the largest column of the Jacobian met, so that units do not matter; bounds are
 * met by an active set. Near the optimum, where rounding hides changes of the sum, undamped steps are taken as
 * long as they shrink.
 *
 * @param start - [size]; moved onto the nearest bound where it lies outside.
 * @see Moré (1978), The Levenberg-Marquardt algorithm: implementation and theory; the stop on the residuals'
 *   part along the Jacobian is the relative offset of Bates and Watts (1981), Technometrics 23:179.
 * @example
 * // Two residuals, c - 3 and 2 c - 4: R = sqrt(5), R'z = (c - 3) + 2 (2 c - 4), and the best c is 11/5.
 * const triangle = Float64Array.of(Math.sqrt(5)), projected = Float64Array.of(0);
 * const evaluate = (at) => (at[0] - 3) ** 2 + (2 * at[0] - 4) ** 2;
 * const linearise = (at) => { projected[0] = (5 * at[0] - 11) / triangle[0]; return true; };
 * minimiseSquares({ size: 1, triangle, projected, evaluate, linearise }, Float64Array.of(0)).estimates[0]; // 2.2
 */
export function minimiseSquares(
  system: LinearisedSystem,
  start: Float64Array,
  options: MinimiseOptions = {},
): Minimum {
  const { gradientTolerance = 1e-10, stepTolerance = 1e-13, iterationLimit = 1000, reach = 100 } = options;
  const workspace = options.workspace ?? squaresWorkspace(system.size);
  const bounds = boundsOf(options, system.size);
  const parameters = start.slice();
  if (bounds !== undefined)
    for (let j = 0; j < system.size; j++) parameters[j] = within(parameters[j]!, bounds, j);
  const at: Search = {
    parameters,
    sum: system.evaluate(parameters),
    radius: reach,
    damping: 0,
    evaluations: 1,
    iterations: 0,
    count: 0,
    lastRefinement: Number.POSITIVE_INFINITY,
  };
  const steps = bounds === undefined ? onSystem(workspace, system) : workspace;
  const problem: SearchProblem = { system, bounds, workspace, steps, gradientTolerance, stepTolerance };
  if (!Number.isFinite(at.sum))
    return ended(at, { kind: "failed", reason: "the model is not finite at the start" });
  workspace.scale.fill(0);
  let stop = settle(problem, at);
  at.radius = reach * scaledLength(workspace.scale, parameters, system.size) || reach;
  while (stop === undefined) stop = at.evaluations > iterationLimit ? outOfIterations : tryStep(problem, at);
  return ended(at, stop);
}

/** The workspace with the system's own triangle in place of that of the parameters that may move, which are all. */
function onSystem(workspace: SquaresWorkspace, { triangle, projected }: LinearisedSystem): SquaresWorkspace {
  return { ...workspace, triangle, projected, freeScale: workspace.scale, freeStep: workspace.step };
}

function ended(at: Search, stop: StopReason): Minimum {
  return {
    estimates: at.parameters,
    stop,
    sumOfSquares: at.sum,
    iterations: at.iterations,
    evaluations: at.evaluations,
  };
}

function boundsOf(options: MinimiseOptions, size: number): Bounds | undefined {
  const { lower, upper } = options;
  if (lower === undefined && upper === undefined) return undefined;
  return {
    lower: lower ?? new Float64Array(size).fill(Number.NEGATIVE_INFINITY),
    upper: upper ?? new Float64Array(size).fill(Number.POSITIVE_INFINITY),
  };
}
