import { makeReflector, reflect } from "../algebra/reflection.js";

/**
 * Householder QR of a Jacobian J [rows, size] held by columns, with the residuals r [rows] carried along.
 * Overwrites `columns` and `residuals`.
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
    const head = makeReflector(column, k);
    if (Number.isNaN(head)) return false;
    if (head !== 0) {
      for (let j = k + 1; j < size; j++) reflect(column, head, k, columns[j]!);
      reflect(column, head, k, residuals);
    }
    triangle[k * size + k] = head;
    for (let j = k + 1; j < size; j++) triangle[k * size + j] = columns[j]![k] ?? 0;
    projected[k] = residuals[k] ?? 0;
  }
  return true;
}
