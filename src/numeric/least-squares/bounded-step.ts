import { rotateRowIn } from "../algebra/rotate-row-in.js";
import { predictedReduction } from "./linear-model.js";
import type { LinearisedSystem } from "./linearised-system.js";
import type { SquaresWorkspace } from "./squares-workspace.js";
import { trustRegionStep } from "./trust-region-step.js";

/** Lowest and highest admitted values [size]; infinite where open. */
export interface Bounds {
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/**
 * Marks in `workspace.held` the parameters that sit on a bound with the sum of squares falling outwards, and
 * makes the triangle of the others.
 *
 * @returns how many parameters may move.
 */
export function holdAtBounds(
  workspace: SquaresWorkspace,
  triangle: Float64Array,
  projected: Float64Array,
  parameters: Float64Array,
  bounds: Bounds,
): number {
  const { held, gradient, size } = workspace;
  for (let j = 0; j < size; j++) {
    let slope = 0;
    for (let i = 0; i <= j; i++) slope += triangle[i * size + j]! * projected[i]!;
    gradient[j] = slope;
    const atLower = parameters[j]! <= bounds.lower[j]! && slope >= 0;
    const atUpper = parameters[j]! >= bounds.upper[j]! && slope <= 0;
    held[j] = atLower || atUpper ? 1 : 0;
    workspace.step[j] = 0;
  }
  return triangleOfFree(workspace, triangle, projected);
}

/** Triangle, right-hand side and scale of the parameters not held, those held being moved by `workspace.step`. */
export function triangleOfFree(
  workspace: SquaresWorkspace,
  triangle: Float64Array,
  projected: Float64Array,
): number {
  const { held, free, row, step, size } = workspace;
  const count = listFree(workspace);
  workspace.triangle.fill(0);
  workspace.projected.fill(0);
  for (let i = 0; i < size; i++) {
    let right = projected[i]!;
    for (let j = i; j < size; j++) if (held[j] === 1) right += triangle[i * size + j]! * step[j]!;
    for (let k = 0; k < count; k++) row[k] = free[k]! >= i ? triangle[i * size + free[k]!]! : 0;
    rotateRowIn(workspace.triangle, workspace.projected, row, right, 0, count, size);
  }
  return count;
}

function listFree(workspace: SquaresWorkspace): number {
  let count = 0;
  for (let j = 0; j < workspace.size; j++) {
    if (workspace.held[j] === 1) continue;
    workspace.free[count] = j;
    workspace.freeScale[count++] = workspace.scale[j]!;
  }
  return count;
}

/**
 * The trust-region step that stays inside the bounds: parameters whose step would cross a bound are moved onto
 * it and held there, and the others find their step anew, until none crosses. Where that does not promise a
 * reduction, the step follows the scaled gradient, bent at the bounds. Written to `workspace.step`.
 *
 * @param count - parameters that may move, as `holdAtBounds` returned it.
 * @returns the damping used.
 */
export function boundedStep(
  workspace: SquaresWorkspace,
  system: LinearisedSystem,
  parameters: Float64Array,
  bounds: Bounds,
  count: number,
  radius: number,
  guess: number,
): number {
  const { held, free, freeStep, step } = workspace;
  const { triangle, projected } = system;
  let damping = guess;
  let moving = count;
  let crossed = true;
  while (crossed && moving > 0) {
    damping = trustRegionStep(workspace, moving, radius, damping);
    crossed = false;
    for (let k = 0; k < moving; k++) {
      const j = free[k]!;
      const end = within(parameters[j]! + freeStep[k]!, bounds, j);
      crossed ||= end !== parameters[j]! + freeStep[k]!;
      step[j] = end - parameters[j]!;
      if (end !== parameters[j]! + freeStep[k]!) held[j] = 1;
    }
    if (crossed) moving = triangleOfFree(workspace, triangle, projected);
  }
  if (!(predictedReduction(triangle, projected, step) > 0)) {
    gradientStep(workspace, parameters, bounds, radius);
  }
  return damping;
}

function gradientStep(
  workspace: SquaresWorkspace,
  parameters: Float64Array,
  bounds: Bounds,
  radius: number,
): void {
  const { gradient, scale, step, size } = workspace;
  let length = 0;
  for (let j = 0; j < size; j++) length += (gradient[j]! / scale[j]!) ** 2;
  const reach = radius / Math.sqrt(length);
  for (let j = 0; j < size; j++) {
    const end = parameters[j]! - (reach * gradient[j]!) / scale[j]! ** 2;
    step[j] = within(end, bounds, j) - parameters[j]!;
  }
}

/** The value, or the bound of parameter j that it lies beyond. */
export function within(value: number, bounds: Bounds, j: number): number {
  return Math.min(Math.max(value, bounds.lower[j]!), bounds.upper[j]!);
}
