import { backSubstitute, dampedStep } from "./damped-step.js";
import type { SquaresWorkspace } from "./squares-workspace.js";

/** How far from the trust radius the length of a step may be, relative. */
const slack = 0.1;

/**
 * Writes to `workspace.freeStep` the step d [size] that minimises ||R d + z||^2 with ||D d|| <= radius
 * (to a tenth), R, z and D being the workspace's `triangle`, `projected` and `freeScale`.
 *
 * @param damping - a first guess of the damping, from the step before; 0 for none.
 * @returns the damping used; 0 when the undamped (Gauss-Newton) step fits inside the radius.
 * @see Moré (1978), The Levenberg-Marquardt algorithm: implementation and theory, section 5: Newton's
 *   iteration on 1/radius - 1/||D d||, kept between bounds.
 */
export function trustRegionStep(
  workspace: SquaresWorkspace,
  size: number,
  radius: number,
  damping: number,
): number {
  const { triangle, projected, freeScale, freeStep, size: width } = workspace;
  backSubstitute(triangle, projected, size, width, freeStep);
  const length = scaledLength(freeScale, freeStep, size);
  if (length <= (1 + slack) * radius) return 0;
  return dampedIntoRadius(workspace, size, radius, damping, length);
}

/** ||D d||. */
export function scaledLength(scale: Float64Array, step: Float64Array, size: number): number {
  let sum = 0;
  for (let i = 0; i < size; i++) sum += (scale[i]! * step[i]!) ** 2;
  return Math.sqrt(sum);
}

function dampedIntoRadius(
  workspace: SquaresWorkspace,
  size: number,
  radius: number,
  guess: number,
  undampedLength: number,
): number {
  const { triangle, freeScale, freeStep, damped } = workspace;
  const slope = scaledGradientLength(workspace, size);
  const corrected = newtonCorrection(workspace, triangle, size, undampedLength, radius);
  let lowest = Number.isFinite(corrected) ? corrected : 0;
  let highest = slope / radius || Number.MIN_VALUE / Math.min(radius, slack);
  let damping = Math.min(Math.max(guess, lowest), highest) || slope / (undampedLength + radius) || highest;
  for (let round = 0; round < 12; round++) {
    dampedStep(workspace, size, damping);
    const length = scaledLength(freeScale, freeStep, size);
    const excess = length - radius;
    if (Math.abs(excess) <= slack * radius) break;
    if (excess > 0) lowest = Math.max(lowest, damping);
    else highest = Math.min(highest, damping);
    damping += newtonCorrection(workspace, damped, size, length, radius);
    damping = Math.min(Math.max(damping, lowest), highest);
  }
  return damping;
}

/** The Newton correction of the damping at a step of the given scaled length, R being the triangle it came from. */
function newtonCorrection(
  workspace: SquaresWorkspace,
  triangle: Float64Array,
  size: number,
  length: number,
  radius: number,
): number {
  const { freeScale, freeStep, work, size: width } = workspace;
  let sum = 0;
  for (let i = 0; i < size; i++) {
    let value = (freeScale[i]! * freeScale[i]! * freeStep[i]!) / length;
    for (let k = 0; k < i; k++) value -= triangle[k * width + i]! * work[k]!;
    value /= triangle[i * width + i]!;
    work[i] = value;
    sum += value * value;
  }
  return (length - radius) / radius / sum;
}

/** ||D^-1 R'z||, which bounds the damping from above once divided by the radius. */
function scaledGradientLength(workspace: SquaresWorkspace, size: number): number {
  const { triangle, projected, freeScale, size: width } = workspace;
  let sum = 0;
  for (let j = 0; j < size; j++) {
    let value = 0;
    for (let i = 0; i <= j; i++) value += triangle[i * width + j]! * projected[i]!;
    sum += (value / freeScale[j]!) ** 2;
  }
  return Math.sqrt(sum);
}
