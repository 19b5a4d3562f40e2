/** The values of a column at some rows. A plain loop: a record may have millions of rows. */
export function pick(column: Float64Array, rows: Int32Array): Float64Array {
  const picked = new Float64Array(rows.length);
  for (let i = 0; i < rows.length; i++) picked[i] = column[rows[i]!]!;
  return picked;
}
