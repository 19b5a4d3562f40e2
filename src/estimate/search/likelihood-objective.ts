import {
  covarianceFromTriangle,
  minimise,
  secondDerivatives,
  type UnscaledCovariance,
} from "../../numeric/index.js";
import { factorSums } from "../systems/factor-sums.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import type { Objective } from "./objective.js";

const relativeStep = Math.cbrt(Number.EPSILON);
/** Second derivatives by differences keep about six digits. */
const dependent = 1e-3;

/**
 * Twice a negative log-likelihood as an objective, with derivatives by differences.
 *
 * @param value - at the unknowns; infinite where the likelihood does not exist.
 * @param settle - fits weights over gaps to a point.
 */
export function likelihoodObjective(
  value: (at: Float64Array) => number,
  { names, lower, upper }: Unknowns,
  settle?: Objective["settle"],
): Objective {
  const size = names.length;
  let last = new Float64Array(size);
  let scale: Float64Array | undefined;
  let inverse: Float64Array | undefined;
  return {
    size,
    value,
    ...(settle && { settle }),
    minimise(start, low, high) {
      // Each search by the size of its own start: one that began far off would leave the others with huge steps.
      scale = start.map((each) => Math.abs(each) || 1);
      const found = minimise(value, start, { lower: low, upper: high, scale, ...(inverse && { inverse }) });
      last = Float64Array.from(found.estimates);
      return found;
    },
    slope(i) {
      const here = last[i]!;
      const step = relativeStep * Math.max(Math.abs(here), 1e-3 * (scale?.[i] ?? 1));
      last[i] = here + step;
      const above = value(last);
      last[i] = here - step;
      const below = value(last);
      last[i] = here;
      return (above - below) / (2 * step);
    },
    covariance(at) {
      const free = Array.from(at, (_, i) => i).filter((i) => at[i]! > lower[i]! && at[i]! < upper[i]!);
      const found = covarianceOfFree(value, at, free);
      // Profiles search from here: the inverse of the whole second derivatives shortens every one of them.
      inverse = found.covariance.map((entry, k) => {
        const onDiagonal = k % (size + 1) === 0;
        const guess = onDiagonal ? (0.2 * (scale?.[k / (size + 1)] ?? 1)) ** 2 : 0;
        return Number.isNaN(entry) ? guess : entry / 2;
      });
      return found;
    },
  };
}

/** Inverse of half the second derivatives by the unknowns inside their bounds; those at a bound have none. */
function covarianceOfFree(
  value: (at: Float64Array) => number,
  at: Float64Array,
  free: readonly number[],
): UnscaledCovariance {
  const size = at.length;
  const count = free.length;
  const whole = at.slice();
  const along = (inside: Float64Array): number => {
    free.forEach((i, k) => {
      whole[i] = inside[k]!;
    });
    return value(whole);
  };
  const bends = secondDerivatives(
    along,
    Float64Array.from(free, (i) => at[i]!),
  );
  const triangle = new Float64Array(count * count);
  factorSums(
    bends.map((bend) => bend / 2),
    new Float64Array(count),
    triangle,
    new Float64Array(count),
  );
  const inside = covarianceFromTriangle(triangle, count, dependent);
  const covariance = new Float64Array(size * size).fill(Number.NaN);
  const determined = new Array<boolean>(size).fill(false);
  free.forEach((i, a) => {
    determined[i] = inside.determined[a]!;
    free.forEach((j, b) => {
      covariance[i * size + j] = inside.covariance[a * count + b]!;
    });
  });
  return { covariance, determined, rank: inside.rank };
}
