import {
  covarianceFromTriangle,
  type LinearisedSystem,
  type Minimum,
  minimiseSquares,
  squaresWorkspace,
} from "../../numeric/index.js";
import type { FitRows } from "../rows/fit-rows.js";
import { logarithmicSystem } from "../systems/logarithmic-system.js";
import { rotatedSystem } from "../systems/rotated-system.js";
import type { Lowest, Objective } from "./objective.js";

/** Columns less independent than this are judged dependent: sums of products square the condition. */
const dependent = 1e-7;
/** Evaluations of a search on either scale. */
const iterationLimit = 200;

/**
 * The sum of squares of a least-squares system as an objective. A search that stops short, or that has lost a direction
 * to rounding, goes on between logarithms, where a curved ridge is straight, and with derivatives that keep their digits.
 *
 * @param rows - the values of the system, one by one.
 */
export function squaresObjective(system: LinearisedSystem, rows: FitRows): Objective {
  const { size, triangle, projected } = system;
  const workspace = squaresWorkspace(size);
  const careful = rotatedSystem(rows);
  return {
    size,
    value: system.evaluate,
    ...(rows.reweigh && { settle: rows.reweigh }),
    minimise(start, lower, upper, enough = Number.NEGATIVE_INFINITY) {
      const plain = minimiseSquares(system, start, { lower, upper, workspace, iterationLimit });
      const { sumOfSquares: sum } = plain;
      if (sum <= enough || !Number.isFinite(sum) || !isShort(plain, triangle, lower, upper))
        return lowest(plain);
      const logs = logarithmicSystem(careful, plain.estimates, { lower, upper });
      const further = minimiseSquares(logs.system, logs.start, { ...logs.bounds, workspace, iterationLimit });
      const isLower = further.sumOfSquares < plain.sumOfSquares;
      const at = isLower ? clipped(logs.back(further.estimates), lower, upper) : plain.estimates;
      const value = system.evaluate(at);
      system.linearise(at);
      const { stop } = isLower ? further : plain;
      return { estimates: at, value, stop, evaluations: plain.evaluations + further.evaluations };
    },
    slope(i) {
      let sum = 0;
      for (let k = 0; k <= i; k++) sum += triangle[k * size + i]! * projected[k]!;
      return 2 * sum;
    },
    covariance(at) {
      system.evaluate(at);
      system.linearise(at);
      return covarianceFromTriangle(triangle, size, dependent);
    },
  };
}

/** Whether a search did not end on its gradient, or ended without the digits of some direction. */
function isShort(
  { stop }: Minimum,
  triangle: Float64Array,
  lower: Float64Array,
  upper: Float64Array,
): boolean {
  if (stop.kind !== "converged" || stop.test === "step") return true;
  return lower.some((low, i) => low < upper[i]! && triangle[i * (lower.length + 1)] === 0);
}

function lowest({ estimates, sumOfSquares, stop, evaluations }: Minimum): Lowest {
  return { estimates, value: sumOfSquares, stop, evaluations };
}

/** A point inside its bounds, on them where it comes within rounding. */
function clipped(at: Float64Array, lower: Float64Array, upper: Float64Array): Float64Array {
  const meets = (value: number, bound: number): boolean => Math.abs(value - bound) <= 1e-12 * Math.abs(bound);
  return at.map((value, i) => {
    if (value <= lower[i]! || meets(value, lower[i]!)) return lower[i]!;
    return value >= upper[i]! || meets(value, upper[i]!) ? upper[i]! : value;
  });
}
