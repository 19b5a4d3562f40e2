import { factorSums } from "./factor-sums.js";

/** Sums of a least-squares fit as a generated function leaves them, and the way from them to a triangle. */
export interface PackedSums {
  /** [width (width + 1)/2 + width]: J'J, upper triangle row after row, then J'r. */
  readonly sums: Float64Array;
  readonly triangle: Float64Array;
  readonly projected: Float64Array;
  readonly factor: () => boolean;
}

/**
 * Picks the unknowns of a fit out of sums over all that a rule has.
 *
 * @param columns - [unknowns]: which of the `width` parameters and initial states each is.
 */
export function packedSums(columns: Int32Array, width: number): PackedSums {
  const size = columns.length;
  const sums = new Float64Array((width * (width + 1)) / 2 + width);
  const products = packedPlaces(columns, width);
  const slopes = columns.map((column) => (width * (width + 1)) / 2 + column);
  const gram = new Float64Array(size * size);
  const gradient = new Float64Array(size);
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  return {
    sums,
    triangle,
    projected,
    factor() {
      for (let a = 0; a < size; a++) {
        gradient[a] = sums[slopes[a]!]!;
        for (let k = a * (size + 1); k < (a + 1) * size; k++) gram[k] = sums[products[k]!]!;
      }
      return factorSums(gram, gradient, triangle, projected);
    },
  };
}

/** Where the product of two unknowns stands among the sums, [unknowns, unknowns]. */
function packedPlaces(columns: Int32Array, width: number): Int32Array {
  const size = columns.length;
  return Int32Array.from({ length: size * size }, (_, k) => {
    const one = columns[Math.floor(k / size)]!;
    const other = columns[k % size]!;
    const low = Math.min(one, other);
    return low * width - (low * (low - 1)) / 2 + Math.max(one, other) - low;
  });
}
