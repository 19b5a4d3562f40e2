import { centralSlope, type DifferenceProblem, disagreement } from "./finite-difference.js";

/** The step at which rounding and curvature weigh about the same in a central difference, relative. */
export const relativeStep: number = Math.cbrt(Number.EPSILON);
/** Two steps whose derivatives agree to this are good enough to look no further. */
const agreed = 1e-5;

/**
 * The step for central differences of parameter j: relative to its typical size, and smaller where the function
 * bends within that. A parameter at 0 of unknown size gets the step, among powers of a hundred, at which the
 * derivative depends on the step least.
 *
 * @param size - typical size of the parameter; 0 when unknown.
 */
export function differenceStep(
  problem: DifferenceProblem,
  parameters: Float64Array,
  j: number,
  size: number,
): number {
  const candidates =
    size > 0
      ? [1, 1e-2, 1e-4].map((part) => part * size * relativeStep)
      : Array.from({ length: 17 }, (_, k) => relativeStep * 100 ** (k - 8));
  const wide = new Float64Array(problem.rows);
  const narrow = new Float64Array(problem.rows);
  let best = candidates[size > 0 ? 0 : 8]!;
  let least = Number.POSITIVE_INFINITY;
  for (const step of candidates) {
    const known =
      centralSlope(problem, parameters, j, step, wide) &&
      centralSlope(problem, parameters, j, step / 4, narrow);
    // A function that does not answer to so small a step tells nothing about it.
    const apart = known && narrow.some((slope) => slope !== 0) ? disagreement(wide, narrow) : Infinity;
    if (apart < least) {
      least = apart;
      best = step;
    }
    if (least < agreed && size > 0) break;
  }
  return best;
}
