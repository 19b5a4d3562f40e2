import {
  covarianceFromTriangle,
  type LinearisedSystem,
  type Minimum,
  minimiseSquares,
  squaresWorkspace,
} from "../../numeric/index.js";
import { logarithmicSystem } from "../systems/logarithmic-system.js";
import type { Lowest, Objective } from "./objective.js";

/** Columns less independent than this are judged dependent: sums of products square the condition. */
const dependent = 1e-7;

/** Evaluations of a search on either scale. */
const iterationLimit = 200;

/** The sum of squares of a least-squares system as an objective. */
export function squaresObjective(system: LinearisedSystem): Objective {
  const { size, triangle, projected } = system;
  const workspace = squaresWorkspace(size);
  return {
    size,
    value: system.evaluate,
    minimise(start, lower, upper) {
      const plain = minimiseSquares(system, start, { lower, upper, workspace, iterationLimit });
      const stalled = plain.stop.kind !== "converged" || plain.stop.test === "step";
      if (!(stalled && Number.isFinite(plain.sumOfSquares))) return lowest(plain);
      // A curved ridge, along which a search creeps, is straight between logarithms.
      const logs = logarithmicSystem(system, plain.estimates, { lower, upper });
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

function lowest({ estimates, sumOfSquares, stop, evaluations }: Minimum): Lowest {
  return { estimates, value: sumOfSquares, stop, evaluations };
}

function clipped(at: Float64Array, lower: Float64Array, upper: Float64Array): Float64Array {
  return at.map((value, i) => Math.min(Math.max(value, lower[i]!), upper[i]!));
}
