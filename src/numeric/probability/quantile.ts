import { emptySample } from "../refusals.js";

/**
 * Quantile of a sample by definition 7: linear between the order statistics, the k-th of n lying at probability
 * (k - 1)/(n - 1).
 *
 * @param sorted - values in increasing order.
 * @param probability - from 0 to 1.
 * @throws {ModelError} `empty-sample` when there is no value.
 * @see Hyndman and Fan (1996), Sample quantiles in statistical packages, The American Statistician 50:361.
 * @example quantile(Float64Array.of(1, 2, 3, 4), 0.5); // 2.5
 */
export function quantile(sorted: ArrayLike<number>, probability: number): number {
  if (sorted.length === 0) throw emptySample();
  const place = (sorted.length - 1) * probability;
  const below = Math.min(Math.max(Math.floor(place), 0), sorted.length - 1);
  const low = sorted[below]!;
  const high = sorted[Math.min(below + 1, sorted.length - 1)]!;
  return high === low ? low : low + (place - below) * (high - low);
}
