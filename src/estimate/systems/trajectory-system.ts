import type { LinearisedSystem } from "../../numeric/index.js";
import type { PathSums } from "../../rule/index.js";
import type { RecordedPath } from "../rows/recorded-path.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import { packedSums } from "./packed-sums.js";

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
  const { columns, parameters, initial } = unknowns;
  const { sums, triangle, projected, factor } = packedSums(columns, parameters.length + initial.length);
  return {
    size: columns.length,
    triangle,
    projected,
    evaluate(at) {
      place(unknowns, at);
      return pathSums(initial, parameters, inputs, first, periods, table, weights, sums);
    },
    linearise: factor,
  };
}
