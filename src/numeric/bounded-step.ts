import type { LinearisedSystem } from "./linearised-system.js";
import { rotateRowIn } from "./rotate-row-in.js";
import type { SquaresWorkspace } from "./squares-workspace.js";
import { trustRegionStep } from "./trust-region-step.js";

/** Lowest and highest admitted values [size]; infinite where open. */
export interface Bounds {
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/**
 * Marks in `workspace.held` the constants that sit on a bound with the sum of squares falling outwards, and
 * makes the triangle of the others.
 *
 * @returns how many constants may move.
 */
export function holdAtBounds(
  workspace: SquaresWorkspace,
  triangle: Float64Array,
  projected: Float64Array,
  constants: Float64Array,
  bounds: Bounds,
): number {
  const { held, gradient, size } = workspace;
  for (let j = 0; j < size; j++) {
    let slope = 0;
    for (let i = 0; i <= j; i++) slope += triangle[i * size + j]! * projected[i]!;
    gradient[j] = slope;
    const atLower = constants[j]! <= bounds.lower[j]! && slope >= 0;
    const atUpper = constants[j]! >= bounds.upper[j]! && slope <= 0;
    held[j] = atLower || atUpper ? 1 : 0;
    workspace.step[j] = 0;
  }
  return triangleOfFree(workspace, triangle, projected);
}

/** Triangle, right-hand side and scale of the constants not held, those held being moved by `workspace.step`. */
export function triangleOfFree(
  workspace: SquaresWorkspace,
  triangle: Float64Array,
  projected: Float64Array,
): number {
  const { held, free, freeScale, scale, row, step, size } = workspace;
  let count = 0;
  for (let j = 0; j < size; j++) {
    if (held[j] === 1) continue;
    free[count] = j;
    freeScale[count++] = scale[j]!;
  }
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

/**
 * The trust-region step that stays inside the bounds: constants whose step would cross a bound are moved onto
 * it and held there, and the others find their step anew, until none crosses. Where that does not promise a
 * reduction, the step follows the scaled gradient, bent at the bounds. Written to `workspace.step`.
 *
 * @param count - constants that may move, as `holdAtBounds` returned it.
 * @returns the damping used.
 */
export function boundedStep(
  workspace: SquaresWorkspace,
  system: LinearisedSystem,
  constants: Float64Array,
  bounds: Bounds,
  count: number,
  radius: number,
  guess: number,
): number {
  const { held, free, freeStep, step, size } = workspace;
  const { triangle, projected } = system;
  let damping = guess;
  let moving = count;
  let crossed = true;
  while (crossed && moving > 0) {
    damping = trustRegionStep(workspace, moving, radius, damping);
    crossed = false;
    for (let k = 0; k < moving; k++) {
      const j = free[k]!;
      const end = clamp(constants[j]! + freeStep[k]!, bounds.lower[j]!, bounds.upper[j]!);
      crossed ||= end !== constants[j]! + freeStep[k]!;
      step[j] = end - constants[j]!;
      if (end !== constants[j]! + freeStep[k]!) held[j] = 1;
    }
    if (crossed) moving = triangleOfFree(workspace, triangle, projected);
  }
  if (!(predictedReduction(triangle, projected, step, size) > 0)) {
    gradientStep(workspace, constants, bounds, radius);
  }
  return damping;
}

/** ||z||^2 - ||z + R d||^2: by how much the sum of squares should fall. */
export function predictedReduction(
  triangle: Float64Array,
  projected: Float64Array,
  step: Float64Array,
  size: number,
): number {
  let sum = 0;
  for (let i = 0; i < size; i++) {
    let moved = 0;
    for (let j = i; j < size; j++) moved += triangle[i * size + j]! * step[j]!;
    sum -= moved * (2 * projected[i]! + moved);
  }
  return sum;
}

function gradientStep(
  workspace: SquaresWorkspace,
  constants: Float64Array,
  bounds: Bounds,
  radius: number,
): void {
  const { gradient, scale, step, size } = workspace;
  let length = 0;
  for (let j = 0; j < size; j++) length += (gradient[j]! / scale[j]!) ** 2;
  const reach = radius / Math.sqrt(length);
  for (let j = 0; j < size; j++) {
    const end = constants[j]! - (reach * gradient[j]!) / scale[j]! ** 2;
    step[j] = clamp(end, bounds.lower[j]!, bounds.upper[j]!) - constants[j]!;
  }
}

function clamp(value: number, lower: number, upper: number): number {
  return value < lower ? lower : value > upper ? upper : value;
}
