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
  const columns = new Float64Array(size * size);
  const lengths = new Float64Array(size);
  for (let j = 0; j < size; j++) {
    let sum = 0;
    for (let i = 0; i <= j; i++) sum += triangle[i * size + j]! ** 2;
    lengths[j] = Math.sqrt(sum);
    for (let i = 0; i <= j; i++) columns[j * size + i] = triangle[i * size + j]! / (lengths[j]! || 1);
  }
  const order = Int32Array.from({ length: size }, (_, j) => j);
  for (let k = 0; k < size; k++) {
    bringLongestForward(columns, order, k, size);
    reflect(columns, k, size);
  }
  const pivoted = new Float64Array(size * size);
  for (let j = 0; j < size; j++) for (let i = 0; i <= j; i++) pivoted[i * size + j] = columns[j * size + i]!;
  return { pivoted, order, lengths };
}

function bringLongestForward(columns: Float64Array, order: Int32Array, k: number, size: number): void {
  let best = k;
  for (let j = k + 1; j < size; j++) if (tail(columns, j, k, size) > tail(columns, best, k, size)) best = j;
  if (best === k) return;
  for (let i = 0; i < size; i++) {
    const kept = columns[k * size + i]!;
    columns[k * size + i] = columns[best * size + i]!;
    columns[best * size + i] = kept;
  }
  const kept = order[k]!;
  order[k] = order[best]!;
  order[best] = kept;
}

function tail(columns: Float64Array, j: number, from: number, size: number): number {
  let sum = 0;
  for (let i = from; i < size; i++) sum += columns[j * size + i]! ** 2;
  return sum;
}

function reflect(columns: Float64Array, k: number, size: number): void {
  const length = Math.sqrt(tail(columns, k, k, size));
  if (length === 0) return;
  const head = columns[k * size + k]!;
  const turned = head > 0 ? -length : length;
  const lead = head - turned;
  const factor = -1 / (turned * lead);
  for (let j = k + 1; j < size; j++) {
    let dot = lead * columns[j * size + k]!;
    for (let i = k + 1; i < size; i++) dot += columns[k * size + i]! * columns[j * size + i]!;
    dot *= factor;
    columns[j * size + k] = columns[j * size + k]! - dot * lead;
    for (let i = k + 1; i < size; i++) {
      columns[j * size + i] = columns[j * size + i]! - dot * columns[k * size + i]!;
    }
  }
  columns[k * size + k] = turned;
}
