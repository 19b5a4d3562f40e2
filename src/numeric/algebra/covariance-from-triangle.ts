import { pivotedTriangle } from "./pivoted-triangle.js";

/** The inverse of R'R as far as it exists. */
export interface UnscaledCovariance {
  /** (R'R)^-1, row-major [size, size]; rows and columns of parameters that are not determined are NaN. */
  readonly covariance: Float64Array;
  /** False for a parameter that some change of the parameters together leaves without effect on the residuals. */
  readonly determined: readonly boolean[];
  readonly rank: number;
}

/**
 * Inverts R'R = J'J as far as the residuals determine the parameters. Multiplied by sigma^2 it is their covariance.
 *
 * The columns are first brought to length 1, so that units do not matter; a parameter with a part in the null
 * space of J is not determined, and no number is made up for it.
 *
 * @param tolerance - a column whose part not explained by the others is shorter than this counts as dependent:
 *   1e-10 suits a triangle from plane rotations, 1e-7 one from sums of products, which squares the condition.
 */
export function covarianceFromTriangle(
  triangle: Float64Array,
  size: number,
  tolerance = 1e-10,
): UnscaledCovariance {
  const { order, lengths, pivoted } = pivotedTriangle(triangle, size);
  const rank = rankOf(pivoted, size, tolerance);
  const inverse = inverseOfTriangle(pivoted, rank, size);
  const determined = determinedParameters(inverse, pivoted, order, lengths, rank, size);
  const covariance = new Float64Array(size * size).fill(Number.NaN);
  for (let a = 0; a < rank; a++) {
    for (let b = 0; b < rank; b++) {
      const i = order[a]!;
      const j = order[b]!;
      if (!determined[i] || !determined[j]) continue;
      let sum = 0;
      for (let k = Math.max(a, b); k < rank; k++) sum += inverse[a * size + k]! * inverse[b * size + k]!;
      covariance[i * size + j] = sum / (lengths[i]! * lengths[j]!);
    }
  }
  return { covariance, determined, rank };
}

function rankOf(pivoted: Float64Array, size: number, tolerance: number): number {
  let rank = 0;
  while (rank < size && Math.abs(pivoted[rank * size + rank]!) > tolerance) rank++;
  return rank;
}

function inverseOfTriangle(triangle: Float64Array, rank: number, size: number): Float64Array {
  const inverse = new Float64Array(size * size);
  for (let j = 0; j < rank; j++) {
    inverse[j * size + j] = 1 / triangle[j * size + j]!;
    for (let i = j - 1; i >= 0; i--) {
      let sum = 0;
      for (let k = i + 1; k <= j; k++) sum += triangle[i * size + k]! * inverse[k * size + j]!;
      inverse[i * size + j] = -sum / triangle[i * size + i]!;
    }
  }
  return inverse;
}

/** Parameters without a part in the null space, whose basis is [-R11^-1 R12; I] in the order of the pivots. */
function determinedParameters(
  inverse: Float64Array,
  pivoted: Float64Array,
  order: Int32Array,
  lengths: Float64Array,
  rank: number,
  size: number,
): readonly boolean[] {
  const determined = Array.from(lengths, (length) => length > 0);
  for (let free = rank; free < size; free++) {
    determined[order[free]!] = false;
    for (let i = 0; i < rank; i++) {
      let part = 0;
      for (let k = i; k < rank; k++) part += inverse[i * size + k]! * pivoted[k * size + free]!;
      if (Math.abs(part) > 1e-6) determined[order[i]!] = false;
    }
  }
  return determined;
}
