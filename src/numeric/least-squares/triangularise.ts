/**
 * Householder QR of a Jacobian J [rows, size] held by columns, with the residuals r [rows] carried along.
 * Uses up `columns` and `residuals`.
 *
 * @param triangle - receives R, row-major [size, size].
 * @param projected - receives the first `size` entries of Q'r.
 * @returns false where an entry is not finite.
 * @see Golub and Van Loan, Matrix Computations, 4th ed., algorithm 5.2.1.
 */
export function triangularise(
  columns: readonly Float64Array[],
  residuals: Float64Array,
  triangle: Float64Array,
  projected: Float64Array,
): boolean {
  const size = columns.length;
  for (let k = 0; k < size; k++) {
    const column = columns[k]!;
    const turned = reflector(column, k);
    if (turned === undefined) return false;
    if (turned !== 0) {
      const factor = -1 / (turned * column[k]!);
      for (let j = k + 1; j < size; j++) reflect(column, columns[j]!, k, factor);
      reflect(column, residuals, k, factor);
    }
    triangle[k * size + k] = turned;
    for (let j = k + 1; j < size; j++) triangle[k * size + j] = columns[j]![k] ?? 0;
    projected[k] = residuals[k] ?? 0;
  }
  return true;
}

/** Makes the column from place k on into its reflector; returns what the reflection turns it into. */
function reflector(column: Float64Array, k: number): number | undefined {
  let sum = 0;
  for (let i = k; i < column.length; i++) sum += column[i]! * column[i]!;
  if (!Number.isFinite(sum)) return undefined;
  if (sum === 0) return 0;
  const length = Math.sqrt(sum);
  const turned = column[k]! > 0 ? -length : length;
  column[k] = column[k]! - turned;
  return turned;
}

function reflect(reflector: Float64Array, column: Float64Array, k: number, factor: number): void {
  let dot = 0;
  for (let i = k; i < column.length; i++) dot += reflector[i]! * column[i]!;
  dot *= factor;
  for (let i = k; i < column.length; i++) column[i] = column[i]! - dot * reflector[i]!;
}
