import { choleskyFactor, choleskyInverse, secondDerivatives } from "../../numeric/index.js";
import type { Lowest } from "../search/objective.js";
import type { Search } from "./search.js";

/** A fit with one unknown held at a value. */
export interface Held {
  /** [unknowns], the held one in its place, as they are reported. */
  readonly estimates: Float64Array;
  /**
   * Cholesky factor of the covariance of the other unknowns, [unknowns - 1, unknowns - 1], 0 for one that lies on a bound;
   * undefined where they cannot be separated.
   */
  readonly factor: Float64Array | undefined;
  /** Increase over the optimum in units of the profile: sigma^2, or twice the log-likelihood. */
  readonly increase: number;
  /** [unknowns], as the search holds them: where the search for the next value may begin. */
  readonly at: Float64Array;
}

/**
 * Fits with unknown i held.
 *
 * @param best - the lowest value of the fit itself.
 * @returns undefined where the rule cannot be run at the value.
 */
export function heldAt(
  search: Search,
  best: number,
  i: number,
  value: number,
  from: Float64Array,
): Held | undefined {
  const { unknowns, objective } = search;
  const inside = unknowns.rooted[i] ? value * value : value;
  if (!(inside >= unknowns.lower[i]! && inside <= unknowns.upper[i]!)) return undefined;
  const [lower, upper, start] = [unknowns.lower.slice(), unknowns.upper.slice(), from.slice()];
  for (const each of [lower, upper, start]) each[i] = inside;
  const found = objective.minimise(start, lower, upper);
  if (!Number.isFinite(found.value)) return undefined;
  const { variance } = search.cutAt(best);
  // With its own sigma^2, which far from the optimum is larger, as a fit that knew the value would give it.
  const own = search.kind === "least-squares" ? (variance * found.value) / best : variance;
  return {
    estimates: found.estimates.map((each, k) => (unknowns.rooted[k] ? Math.sqrt(each) : each)),
    factor: factorOfOthers(search, found, i, own),
    increase: Math.max(0, found.value - best) / variance,
    at: found.estimates,
  };
}

/** From the curvature of the objective by the other unknowns that lie inside their bounds. */
function factorOfOthers(
  { objective, unknowns: { lower, upper } }: Search,
  { estimates }: Lowest,
  held: number,
  variance: number,
): Float64Array | undefined {
  const others = Array.from(estimates, (_, k) => k).filter((k) => k !== held);
  const free = others.filter((k) => estimates[k]! > lower[k]! && estimates[k]! < upper[k]!);
  const whole = estimates.slice();
  const along = (values: Float64Array): number => {
    free.forEach((k, place) => {
      whole[k] = values[place]!;
    });
    return objective.value(whole) / variance;
  };
  const curvature = secondDerivatives(
    along,
    Float64Array.from(free, (k) => estimates[k]!),
  );
  const root = choleskyFactor(
    curvature.map((entry) => entry / 2),
    free.length,
  );
  const factor = root && choleskyFactor(choleskyInverse(root, free.length), free.length);
  if (factor === undefined) return undefined;
  const spread = new Float64Array(others.length ** 2);
  free.forEach((a, row) => {
    free.forEach((b, column) => {
      spread[others.indexOf(a) * others.length + others.indexOf(b)] = factor[row * free.length + column]!;
    });
  });
  return spread;
}
