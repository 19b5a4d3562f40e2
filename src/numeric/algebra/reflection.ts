/**
 * Makes a column from place k on into the vector of the reflection that turns it into (..., head, 0, ..., 0).
 *
 * @returns head; 0 for a column that vanishes from k on, which no reflection changes; NaN where an entry is not finite.
 * @see Golub and Van Loan, Matrix Computations, 4th ed., section 5.1.
 */
export function makeReflector(column: Float64Array, k: number): number {
  let sum = 0;
  for (let i = k; i < column.length; i++) sum += column[i]! * column[i]!;
  if (!Number.isFinite(sum)) return Number.NaN;
  if (sum === 0) return 0;
  const head = column[k]! > 0 ? -Math.sqrt(sum) : Math.sqrt(sum);
  column[k] = column[k]! - head;
  return head;
}

/** Applies to a column the reflection that `makeReflector` made at place k, where it gave `head`. */
export function reflect(reflector: Float64Array, head: number, k: number, column: Float64Array): void {
  let dot = 0;
  for (let i = k; i < column.length; i++) dot += reflector[i]! * column[i]!;
  const factor = -dot / (head * reflector[k]!);
  for (let i = k; i < column.length; i++) column[i] = column[i]! - factor * reflector[i]!;
}
