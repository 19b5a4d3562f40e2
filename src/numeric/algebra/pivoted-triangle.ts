import { makeReflector, reflect } from "./reflection.js";

/** R with its columns at length 1 and in an order in which the diagonal falls. */
export interface PivotedTriangle {
  /** Row-major [size, size]. */
  readonly pivoted: Float64Array;
  /** Column k of `pivoted` is column order[k] of what was given. */
  readonly order: Int32Array;
  /** Lengths of the columns given, in their own order. */
  readonly lengths: Float64Array;
}

/**
 * Householder QR with column pivoting of a triangle R [size, size] whose columns are first brought to length 1.
 *
 * @see Golub and Van Loan, Matrix Computations, 4th ed., algorithm 5.4.1.
 */
export function pivotedTriangle(triangle: Float64Array, size: number): PivotedTriangle {
  const columns = Array.from({ length: size }, (_, j) =>
    Float64Array.from({ length: size }, (_entry, i) => (i <= j ? triangle[i * size + j]! : 0)),
  );
  const lengths = Float64Array.from(columns, (column) => tail(column, 0));
  columns.forEach((column, j) => {
    for (let i = 0; i < size; i++) column[i] = column[i]! / (lengths[j]! || 1);
  });
  const order = Int32Array.from(columns.keys());
  const pivoted = new Float64Array(size * size);
  for (let k = 0; k < size; k++) {
    bringLongestForward(columns, order, k);
    const column = columns[k]!;
    for (let i = 0; i < k; i++) pivoted[i * size + k] = column[i]!;
    const head = makeReflector(column, k);
    pivoted[k * size + k] = head;
    if (head !== 0) for (let j = k + 1; j < size; j++) reflect(column, head, k, columns[j]!);
  }
  return { pivoted, order, lengths };
}

function bringLongestForward(columns: Float64Array[], order: Int32Array, k: number): void {
  let best = k;
  for (let j = k + 1; j < columns.length; j++) if (tail(columns[j]!, k) > tail(columns[best]!, k)) best = j;
  [columns[k], columns[best]] = [columns[best]!, columns[k]!];
  [order[k], order[best]] = [order[best]!, order[k]!];
}

/** Length of a column from place `from` on. */
function tail(column: Float64Array, from: number): number {
  let sum = 0;
  for (let i = from; i < column.length; i++) sum += column[i]! ** 2;
  return Math.sqrt(sum);
}
