import {
  covarianceFromTriangle,
  type LinearisedSystem,
  minimiseSquares,
  squaresWorkspace,
} from "../../numeric/index.js";
import type { Objective } from "./objective.js";

/** Columns less independent than this are judged dependent: sums of products square the condition. */
const dependent = 1e-7;

/** The sum of squares of a least-squares system as an objective. */
export function squaresObjective(system: LinearisedSystem): Objective {
  const { size, triangle, projected } = system;
  const workspace = squaresWorkspace(size);
  return {
    size,
    value: system.evaluate,
    minimise(start, lower, upper) {
      const { estimates, sumOfSquares, stop, evaluations } = minimiseSquares(system, start, {
        lower,
        upper,
        workspace,
      });
      return { estimates, value: sumOfSquares, stop, evaluations };
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
