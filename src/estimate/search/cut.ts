import { chiSquareQuantile, fQuantile } from "../../numeric/index.js";
import type { FitOptions } from "../options/fit-options.js";

/** What an increase of the objective is divided by, and the critical values of the result. */
export interface Cut {
  readonly variance: number;
  readonly cut: number;
  /** Critical value at the level halfway to certainty: a parameter is determined where even that one is passed. */
  readonly firmCut: number;
}

/**
 * sigma^2 and the critical values of a sum of squares, by the fit's convention. The chi-square cut is that of the
 * likelihood with sigma^2 = RSS/n at every value: n ln(RSS(value)/RSS).
 */
export function cutOf(sumOfSquares: number, count: number, free: number, options: FitOptions): Cut {
  if (options.sd !== undefined) return likelihoodCut(options);
  const left = count - free;
  const critical = (level: number): number =>
    options.cut === "chi-square"
      ? left * Math.expm1(chiSquareQuantile(level, 1) / count)
      : fQuantile(level, 1, left);
  const [cut, firmCut] = levels(options).map(critical) as [number, number];
  return { variance: sumOfSquares / left, cut, firmCut };
}

/** The critical values of twice a negative log-likelihood. */
export function likelihoodCut(options: FitOptions): Cut {
  const [cut, firmCut] = levels(options).map((level) => chiSquareQuantile(level, 1)) as [number, number];
  return { variance: 1, cut, firmCut };
}

/**
 * The critical values of twice a negative log-likelihood of normal errors whose sigma is found with the rest: those of
 * least squares, n ln(1 + F/(n - p)), so that a record with few censored values is judged as one with none.
 *
 * @param free - unknowns besides sigma.
 */
export function normalLikelihoodCut(count: number, free: number, options: FitOptions): Cut {
  if (options.cut === "chi-square") return likelihoodCut(options);
  const left = count - free;
  const critical = (level: number): number => count * Math.log1p(fQuantile(level, 1, left) / left);
  const [cut, firmCut] = levels(options).map(critical) as [number, number];
  return { variance: 1, cut, firmCut };
}

function levels({ level = 0.95 }: FitOptions): readonly [number, number] {
  return [level, (1 + level) / 2];
}
