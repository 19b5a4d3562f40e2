import {
  covarianceFromTriangle,
  minimise,
  secondDerivatives,
  type UnscaledCovariance,
} from "../numeric/index.js";
import { factorSums } from "./factor-sums.js";
import type { Objective } from "./objective.js";

const relativeStep = Math.cbrt(Number.EPSILON);
/** Second derivatives by differences keep about six digits. */
const dependent = 1e-3;

/**
 * Twice a negative log-likelihood as an objective, with derivatives by differences.
 *
 * @param value - at unknowns [size]; infinite where the likelihood does not exist.
 */
export function likelihoodObjective(size: number, value: (at: Float64Array) => number): Objective {
  let last = new Float64Array(size);
  let inverse: Float64Array | undefined;
  return {
    size,
    minimise(start, lower, upper) {
      const found = minimise(value, start, { lower, upper, ...(inverse && { inverse }) });
      last = Float64Array.from(found.estimates);
      return found;
    },
    slope(i) {
      const here = last[i]!;
      const step = relativeStep * Math.max(Math.abs(here), 1e-3);
      last[i] = here + step;
      const above = value(last);
      last[i] = here - step;
      const below = value(last);
      last[i] = here;
      return (above - below) / (2 * step);
    },
    covariance(at) {
      const found = inverseOfHalf(secondDerivatives(value, at.slice()), size);
      // Profiles search from here: the inverse of the whole second derivatives shortens every one of them.
      inverse = found.covariance.map((entry) => entry / 2);
      return found;
    },
  };
}

function inverseOfHalf(bends: Float64Array, size: number): UnscaledCovariance {
  const triangle = new Float64Array(size * size);
  const none = new Float64Array(size);
  factorSums(
    bends.map((bend) => bend / 2),
    none,
    triangle,
    new Float64Array(size),
  );
  return covarianceFromTriangle(triangle, size, dependent);
}
