import { chiSquareQuantile, fQuantile } from "../numeric/index.js";
import type { FitOptions } from "./fit-options.js";

/** sigma^2 and the critical value of the profile's increase, by the fit's convention. */
export function cutOf(
  sumOfSquares: number,
  count: number,
  free: number,
  options: FitOptions,
): { readonly variance: number; readonly cut: number } {
  const level = options.level ?? 0.95;
  if (options.cut === "chi-square")
    return { variance: sumOfSquares / count, cut: chiSquareQuantile(level, 1) };
  return { variance: sumOfSquares / (count - free), cut: fQuantile(level, 1, count - free) };
}
