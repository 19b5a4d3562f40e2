import type { StopReason } from "../search/stop-reason.js";
import { type Bounds, boundedStep, holdAtBounds } from "./bounded-step.js";
import { predictedReduction, slopeAlong } from "./linear-model.js";
import type { LinearisedSystem } from "./linearised-system.js";
import type { SquaresWorkspace } from "./squares-workspace.js";
import { scaledLength, trustRegionStep } from "./trust-region-step.js";

/** What stays the same during a search. */
export interface SearchProblem {
  readonly system: LinearisedSystem;
  readonly bounds: Bounds | undefined;
  readonly workspace: SquaresWorkspace;
  /** The workspace as steps are found on it: without bounds it reads and writes the system's own arrays. */
  readonly steps: SquaresWorkspace;
  readonly gradientTolerance: number;
  readonly stepTolerance: number;
}

/** Where a search stands. */
export interface Search {
  readonly parameters: Float64Array;
  sum: number;
  radius: number;
  damping: number;
  evaluations: number;
  iterations: number;
  /** Parameters that may move. */
  count: number;
  /** Length of the last step taken near the optimum, where rounding hides changes of the sum. */
  lastRefinement: number;
}

const byGradient: StopReason = Object.freeze({ kind: "converged", test: "gradient" });
const byStep: StopReason = Object.freeze({ kind: "converged", test: "step" });
const byReduction: StopReason = Object.freeze({ kind: "converged", test: "reduction" });
const derivativesLost: StopReason = Object.freeze({
  kind: "failed",
  reason: "the derivatives are not finite where the search went",
});

/** Relative reduction below which rounding, not the model, may decide how the sum of squares changes. */
const refining = 1e-9;
/** Least share of the predicted reduction that a step must bring. */
const leastRatio = 1e-4;
const rounding = 2 * Number.EPSILON;

/** Takes up the linear model of the system at the point reached; says whether it is the optimum. */
export function settle(problem: SearchProblem, at: Search): StopReason | undefined {
  const { system, bounds, workspace } = problem;
  if (!system.linearise(at.parameters)) return derivativesLost;
  growScale(workspace, system.triangle);
  if (bounds !== undefined) {
    at.count = holdAtBounds(workspace, system.triangle, system.projected, at.parameters, bounds);
  } else {
    at.count = system.size;
  }
  return offset(problem.steps, at.count) <= problem.gradientTolerance * Math.sqrt(at.sum)
    ? byGradient
    : undefined;
}

/** Tries one step, and moves there when the sum of squares falls enough; says whether the search is over. */
export function tryStep(problem: SearchProblem, at: Search): StopReason | undefined {
  const { system, workspace } = problem;
  const { step, trial, scale, size } = workspace;
  findStep(problem, at);
  const length = scaledLength(scale, step, size);
  if (at.evaluations === 1) at.radius = Math.min(at.radius, length);
  for (let j = 0; j < size; j++) trial[j] = at.parameters[j]! + step[j]!;
  const sum = system.evaluate(trial);
  at.evaluations++;
  const actual = sum < 100 * at.sum ? 1 - sum / at.sum : -1;
  const predicted = predictedReduction(system.triangle, system.projected, step) / at.sum;
  if (at.damping === 0 && predicted <= refining) return refine(problem, at, sum, actual, length);
  const ratio = predicted > 0 ? actual / predicted : 0;
  changeRadius(problem, at, length, actual, ratio);
  if (ratio < leastRatio) return tooSmall(problem, at, at.radius);
  const settled = move(problem, at, sum) ?? tooSmall(problem, at, at.radius);
  return settled ?? (predicted <= rounding && Math.abs(actual) <= rounding ? byReduction : undefined);
}

/** Takes an undamped step near the optimum, unless the sum rises or the steps no longer shrink. */
function refine(
  problem: SearchProblem,
  at: Search,
  sum: number,
  actual: number,
  length: number,
): StopReason | undefined {
  if (actual < -refining || length > 0.95 * at.lastRefinement) return byReduction;
  at.lastRefinement = length;
  return move(problem, at, sum) ?? tooSmall(problem, at, length);
}

function move(problem: SearchProblem, at: Search, sum: number): StopReason | undefined {
  for (let j = 0; j < at.parameters.length; j++) at.parameters[j] = problem.workspace.trial[j]!;
  at.sum = sum;
  at.iterations++;
  return settle(problem, at);
}

function findStep(problem: SearchProblem, at: Search): void {
  const { system, bounds, workspace } = problem;
  if (bounds !== undefined) {
    at.damping = boundedStep(workspace, system, at.parameters, bounds, at.count, at.radius, at.damping);
    return;
  }
  at.damping = trustRegionStep(problem.steps, at.count, at.radius, at.damping);
}

function changeRadius(
  problem: SearchProblem,
  at: Search,
  length: number,
  actual: number,
  ratio: number,
): void {
  if (ratio <= 0.25) {
    const cut = actual >= 0 ? 0.5 : cutAfter(problem, actual, at.sum);
    at.radius = cut * Math.min(at.radius, 10 * length);
    at.damping /= cut;
  } else if (at.damping === 0 || ratio >= 0.75) {
    at.radius = 2 * length;
    at.damping *= 0.5;
  }
}

/** By how much to cut the radius: to where the parabola through both sums and the slope is lowest. */
function cutAfter(problem: SearchProblem, actual: number, sum: number): number {
  if (actual <= -1) return 0.1;
  const slope = slopeAlong(problem.system.triangle, problem.system.projected, problem.workspace.step);
  const cut = (0.5 * slope) / (slope + 0.5 * actual * sum);
  return cut > 0.1 ? Math.min(cut, 0.5) : 0.1;
}

function tooSmall(problem: SearchProblem, at: Search, length: number): StopReason | undefined {
  const { workspace, stepTolerance } = problem;
  const least = stepTolerance * scaledLength(workspace.scale, at.parameters, workspace.size);
  return length <= least ? byStep : undefined;
}

/** Length of the residuals' part along the Jacobian of the parameters that may move. */
function offset(workspace: SquaresWorkspace, count: number): number {
  let sum = 0;
  for (let i = 0; i < count; i++) sum += workspace.projected[i]! * workspace.projected[i]!;
  return Math.sqrt(sum);
}

/** Scales never shrink, so that a parameter that once mattered does not run away where it matters less. */
function growScale(workspace: SquaresWorkspace, triangle: Float64Array): void {
  const { scale, size } = workspace;
  for (let j = 0; j < size; j++) {
    let sum = 0;
    for (let i = 0; i <= j; i++) sum += triangle[i * size + j]! * triangle[i * size + j]!;
    scale[j] = Math.max(scale[j]!, Math.sqrt(sum)) || 1;
  }
}
