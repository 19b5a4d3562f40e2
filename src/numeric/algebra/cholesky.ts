/**
 * Cholesky factor L [size, size] of a symmetric positive definite matrix: L L' = matrix.
 *
 * @param matrix - row-major [size, size]; only its lower part is read.
 * @returns L, zero above the diagonal; undefined where the matrix is not positive definite in double precision.
 */
export function choleskyFactor(matrix: Float64Array, size: number): Float64Array | undefined {
  const factor = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < i; j++)
      factor[i * size + j] = remainder(matrix, factor, i, j, size) / factor[j * size + j]!;
    const pivot = remainder(matrix, factor, i, i, size);
    if (!(pivot > Number.EPSILON * size * matrix[i * size + i]!)) return undefined;
    factor[i * size + i] = Math.sqrt(pivot);
  }
  return factor;
}

/** What is left of an entry when the columns before it are taken out. */
function remainder(matrix: Float64Array, factor: Float64Array, i: number, j: number, size: number): number {
  let sum = matrix[i * size + j]!;
  for (let k = 0; k < j; k++) sum -= factor[i * size + k]! * factor[j * size + k]!;
  return sum;
}

/** Solves L L' x = right for x [size]. */
export function choleskySolve(factor: Float64Array, right: Float64Array, size: number): Float64Array {
  const x = right.slice();
  for (let i = 0; i < size; i++) {
    let sum = x[i]!;
    for (let k = 0; k < i; k++) sum -= factor[i * size + k]! * x[k]!;
    x[i] = sum / factor[i * size + i]!;
  }
  for (let i = size - 1; i >= 0; i--) {
    let sum = x[i]!;
    for (let k = i + 1; k < size; k++) sum -= factor[k * size + i]! * x[k]!;
    x[i] = sum / factor[i * size + i]!;
  }
  return x;
}

/** The inverse [size, size] of the matrix with the given Cholesky factor. */
export function choleskyInverse(factor: Float64Array, size: number): Float64Array {
  const inverse = new Float64Array(size * size);
  const unit = new Float64Array(size);
  for (let j = 0; j < size; j++) {
    unit.fill(0);
    unit[j] = 1;
    const column = choleskySolve(factor, unit, size);
    for (let i = 0; i < size; i++) inverse[i * size + j] = column[i]!;
  }
  return inverse;
}
