import type { LinearisedSystem } from "../../numeric/index.js";
import type { FitRows } from "../rows/fit-rows.js";
import { factorSums } from "./factor-sums.js";

/**
 * A least-squares system that sums J'J and J'r in one pass through the residuals, and hands the solver their
 * triangle (Cholesky).
 *
 * A pivot that has lost all its digits is set to 0, so that the solver sees the deficiency instead of noise.
 * The gradient J'r is exact either way, so the optimum has full accuracy although the sums square the condition.
 */
export function normalEquations(rows: FitRows): LinearisedSystem {
  const size = rows.size;
  const gram = new Float64Array(size * size);
  const gradient = new Float64Array(size);
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  let sum = Number.NaN;
  return {
    size,
    triangle,
    projected,
    evaluate(unknowns) {
      rows.prepare(unknowns, true);
      gram.fill(0);
      gradient.fill(0);
      sum = accumulate(rows, gram, gradient);
      return sum;
    },
    linearise: () => Number.isFinite(sum) && factorSums(gram, gradient, triangle, projected),
  };
}

function accumulate(rows: FitRows, gram: Float64Array, gradient: Float64Array): number {
  const { row, size, count } = rows;
  let sum = 0;
  for (let i = 0; i < count; i++) {
    const residual = rows.residualAt(i);
    sum += residual * residual;
    for (let a = 0; a < size; a++) {
      const slope = row[a]!;
      gradient[a] = gradient[a]! + slope * residual;
      for (let b = a; b < size; b++) gram[a * size + b] = gram[a * size + b]! + slope * row[b]!;
    }
  }
  return sum;
}
