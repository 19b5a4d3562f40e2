import type { LinearisedSystem } from "../numeric/index.js";
import type { PathSums } from "../rule/index.js";
import { factorSums } from "./factor-sums.js";
import type { RecordedPath } from "./recorded-path.js";
import { place, type Unknowns } from "./unknowns.js";

/**
 * The least-squares system of a trajectory fit, its sums gathered in the same pass as the path by `pathSums`.
 */
export function trajectorySystem(
  pathSums: PathSums,
  unknowns: Unknowns,
  {
    inputs,
    first,
    periods,
    table,
    weights,
  }: Pick<RecordedPath, "inputs" | "first" | "periods" | "table" | "weights">,
): LinearisedSystem {
  const size = unknowns.columns.length;
  const { constants, initial } = unknowns;
  const width = constants.length + initial.length;
  const sums = new Float64Array((width * (width + 1)) / 2 + width);
  const products = packedPlaces(unknowns.columns, width);
  const slopes = unknowns.columns.map((column) => (width * (width + 1)) / 2 + column);
  const gram = new Float64Array(size * size);
  const gradient = new Float64Array(size);
  const triangle = new Float64Array(size * size);
  const projected = new Float64Array(size);
  return {
    size,
    triangle,
    projected,
    evaluate(at) {
      place(unknowns, at);
      return pathSums(initial, constants, inputs, first, periods, table, weights, sums);
    },
    linearise() {
      for (let k = 0; k < gram.length; k++) gram[k] = sums[products[k]!]!;
      for (let a = 0; a < size; a++) gradient[a] = sums[slopes[a]!]!;
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
