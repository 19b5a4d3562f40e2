/**
 * Cholesky factor of sums of products: R'R = gram (upper part read), then R'z = gradient; false where a sum is not
 * finite. A pivot that has lost all its digits is set to 0, so that the solver sees the deficiency instead of noise.
 */
export function factorSums(
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
