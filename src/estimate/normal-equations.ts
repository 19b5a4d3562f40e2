import type { LinearisedSystem } from "../numeric/index.js";
import type { ResidualRows } from "./residual-rows.js";

/**
 * A least-squares system that sums J'J and J'r in one pass through the residuals, and hands the solver their
 * triangle (Cholesky).
 *
 * A pivot that has lost all its digits is set to 0, so that the solver sees the deficiency instead of noise.
 * The gradient J'r is exact either way, so the optimum has full accuracy although the sums square the condition.
 */
export function normalEquations(rows: ResidualRows): LinearisedSystem {
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
    linearise: () => Number.isFinite(sum) && factor(gram, gradient, triangle, projected),
  };
}

/** The sum of squares alone, without derivatives. */
export function sumOfSquaresAt(rows: ResidualRows, unknowns: Float64Array): number {
  rows.prepare(unknowns, false);
  let sum = 0;
  for (let i = 0; i < rows.count; i++) {
    const residual = rows.residualAt(i);
    sum += residual * residual;
  }
  return sum;
}

function accumulate(rows: ResidualRows, gram: Float64Array, gradient: Float64Array): number {
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

/** Cholesky R'R = gram (upper part read), then R'z = gradient; false where a sum is not finite. */
function factor(
  gram: Float64Array,
  gradient: Float64Array,
  triangle: Float64Array,
  z: Float64Array,
): boolean {
  const size = gradient.length;
  for (let a = 0; a < size; a++) {
    const whole = gram[a * size + a]!;
    const pivot = whole - above(triangle, size, a, a);
    if (!Number.isFinite(pivot)) return false;
    const root = pivot > 4 * Number.EPSILON * whole ? Math.sqrt(pivot) : 0;
    const inverse = root > 0 ? 1 / root : 0;
    let right = gradient[a]!;
    for (let k = 0; k < a; k++) right -= triangle[k * size + a]! * z[k]!;
    z[a] = right * inverse;
    triangle[a * size + a] = root;
    for (let b = a + 1; b < size; b++)
      triangle[a * size + b] = (gram[a * size + b]! - above(triangle, size, a, b)) * inverse;
  }
  return true;
}

/** Product of columns a and b of the triangle above row a. */
function above(triangle: Float64Array, size: number, a: number, b: number): number {
  let sum = 0;
  for (let k = 0; k < a; k++) sum += triangle[k * size + a]! * triangle[k * size + b]!;
  return sum;
}
