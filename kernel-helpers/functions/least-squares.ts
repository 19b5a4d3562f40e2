import {
  type LeastSquaresProblem,
  type LeastSquaresSolution,
  leastSquares as minimiseSquares,
} from "../../src/numeric/index.js";
import { checkCall } from "../options/index.js";

/**
 * Finds the parameters that minimise a sum of squared residuals, with their standard errors and the reason the search
 * stopped.
 *
 * The engine's `leastSquares` says how, and which errors are thrown.
 *
 * @example leastSquares({ residuals: ([a]) => [a - 1, a - 2], start: [0] }).estimates[0]; // 1.5
 */
export function leastSquares(problem: LeastSquaresProblem): LeastSquaresSolution {
  checkCall("leastSquares", arguments);
  return minimiseSquares(problem);
}
