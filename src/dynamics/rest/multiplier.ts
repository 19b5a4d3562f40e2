import { EigenvalueDecomposition, Matrix } from "ml-matrix";

/** A root of the linearised step: real, or one of a complex pair. */
export interface Multiplier {
  readonly re: number;
  readonly im: number;
  readonly modulus: number;
}

const made = (re: number, im: number): Multiplier => ({ re, im, modulus: Math.hypot(re, im) });

/** Both roots of z^2 - trace z + determinant, without cancellation. */
function pairOf(trace: number, determinant: number): readonly Multiplier[] {
  const half = trace / 2;
  const gap = half * half - determinant;
  if (gap < 0) return [made(half, Math.sqrt(-gap)), made(half, -Math.sqrt(-gap))];
  const far = half + (half < 0 ? -1 : 1) * Math.sqrt(gap);
  return far === 0 ? [made(0, 0), made(0, 0)] : [made(far, 0), made(determinant / far, 0)];
}

/**
 * Eigenvalues of a small square matrix [size, size], largest modulus first; exact formulas up to size 2.
 */
export function multipliersOf(matrix: Float64Array, size: number): readonly Multiplier[] {
  if (size === 1) return [made(matrix[0]!, 0)];
  const byModulus = (a: Multiplier, b: Multiplier): number =>
    b.modulus - a.modulus || b.re - a.re || b.im - a.im;
  if (size === 2) {
    const [a = 0, b = 0, c = 0, d = 0] = matrix;
    return [...pairOf(a + d, a * d - b * c)].sort(byModulus);
  }
  if (!matrix.every(Number.isFinite)) return Array.from({ length: size }, () => made(Number.NaN, Number.NaN));
  const rows = Array.from({ length: size }, (_, i) => [...matrix.subarray(i * size, (i + 1) * size)]);
  const found = new EigenvalueDecomposition(new Matrix(rows));
  return found.realEigenvalues.map((re, i) => made(re, found.imaginaryEigenvalues[i]!)).sort(byModulus);
}
