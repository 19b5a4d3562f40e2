import type { LinearisedSystem } from "../../numeric/index.js";
import type { SearchBounds } from "../search/search-bounds.js";

/** A least-squares system over the logarithms of its unknowns, and the way there and back. */
export interface LogarithmicSystem {
  readonly system: LinearisedSystem;
  readonly start: Float64Array;
  readonly bounds: SearchBounds;
  readonly back: (logarithms: Float64Array) => Float64Array;
}

/**
 * The same least-squares system over logarithms of sizes, from a point on: signs are kept, and an unknown at 0 stays on
 * its own scale. A ridge along which a product of powers is constant is straight there.
 */
export function logarithmicSystem(
  system: LinearisedSystem,
  from: Float64Array,
  { lower, upper }: SearchBounds,
): LogarithmicSystem {
  const { size } = system;
  const signs = from.map((value) => Math.sign(value));
  const triangle = new Float64Array(size * size);
  const own = new Float64Array(size);
  const back = (at: Float64Array): Float64Array => {
    for (let i = 0; i < size; i++) own[i] = signs[i] === 0 ? at[i]! : signs[i]! * Math.exp(at[i]!);
    return own;
  };
  const logarithm = (value: number, i: number): number =>
    signs[i] === 0 ? value : Math.log(Math.max(0, signs[i]! * value));
  // Of a negative unknown the upper limit is the one of the smaller size.
  const smallest = lower.map((low, i) => logarithm(signs[i]! < 0 ? upper[i]! : low, i));
  const largest = upper.map((high, i) => logarithm(signs[i]! < 0 ? lower[i]! : high, i));
  return {
    start: from.map(logarithm),
    bounds: { lower: smallest, upper: largest },
    back,
    system: {
      size,
      triangle,
      projected: system.projected,
      evaluate: (at) => system.evaluate(back(at)),
      linearise(at) {
        if (!system.linearise(back(at))) return false;
        for (let k = 0; k < size * size; k++) {
          const i = k % size;
          triangle[k] = system.triangle[k]! * (signs[i] === 0 ? 1 : own[i]!);
        }
        return true;
      },
    },
  };
}
