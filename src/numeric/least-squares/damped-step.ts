import { rotateRowIn } from "../algebra/rotate-row-in.js";
import type { SquaresWorkspace } from "./squares-workspace.js";

/**
 * Solves  min ||R d + z||^2 + damping ||D d||^2  for the step d [size], R, z and D being the workspace's
 * `triangle`, `projected` and `freeScale`. The rows sqrt(damping) D are rotated into a copy of the triangle,
 * left in `damped`, so that R'R is never formed.
 *
 * @see Moré (1978), The Levenberg-Marquardt algorithm: implementation and theory, section 3.
 */
export function dampedStep(workspace: SquaresWorkspace, size: number, damping: number): void {
  const { triangle, projected, freeScale, freeStep, damped, dampedProjected, row, size: width } = workspace;
  const root = Math.sqrt(damping);
  for (let i = 0; i < size; i++) {
    dampedProjected[i] = projected[i]!;
    for (let j = i; j < size; j++) damped[i * width + j] = triangle[i * width + j]!;
  }
  for (let j = 0; j < size; j++) {
    row[j] = root * freeScale[j]!;
    for (let k = j + 1; k < size; k++) row[k] = 0;
    rotateRowIn(damped, dampedProjected, row, 0, j, size, width);
  }
  backSubstitute(damped, dampedProjected, size, width, freeStep);
}

/** Solves R d = -z; a zero on the diagonal gives non-finite entries, which the caller looks for. */
export function backSubstitute(
  triangle: Float64Array,
  z: Float64Array,
  size: number,
  width: number,
  step: Float64Array,
): void {
  for (let i = size - 1; i >= 0; i--) {
    let sum = -z[i]!;
    for (let j = i + 1; j < size; j++) sum -= triangle[i * width + j]! * step[j]!;
    step[i] = sum / triangle[i * width + i]!;
  }
}
