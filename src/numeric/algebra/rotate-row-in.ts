/**
 * Turns a further row [row | right] into the triangle [size, size] (rows of `width`) and its right-hand side by
 * plane rotations: afterwards R'R and R'z have grown by row'row and row' right. Uses `row` up.
 *
 * @param from - the row is zero before this column.
 * @see Golub and Van Loan, Matrix Computations, 4th ed., section 6.5.3: updating a QR factorisation by a row.
 */
export function rotateRowIn(
  triangle: Float64Array,
  projected: Float64Array,
  row: Float64Array,
  right: number,
  from: number,
  size: number,
  width: number,
): void {
  let carried = right;
  for (let k = from; k < size; k++) {
    const below = row[k]!;
    if (below === 0) continue;
    const at = k * width + k;
    const above = triangle[at]!;
    const length = Math.sqrt(above * above + below * below);
    const cosine = above / length;
    const sine = below / length;
    triangle[at] = length;
    const kept = projected[k]!;
    projected[k] = cosine * kept + sine * carried;
    carried = cosine * carried - sine * kept;
    for (let i = k + 1; i < size; i++) {
      const upper = triangle[k * width + i]!;
      const lower = row[i]!;
      triangle[k * width + i] = cosine * upper + sine * lower;
      row[i] = cosine * lower - sine * upper;
    }
  }
}
