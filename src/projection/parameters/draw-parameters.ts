import { choleskyFactor, gammaDraw, type RandomStream } from "../../numeric/index.js";

/**
 * Draws unknowns of a fit around their estimates; writes into `out`, and gives the drawn sigma as a multiple of the
 * estimated one.
 */
export type ParametersDraw = (stream: RandomStream, out: Float64Array) => number;

/** sqrt((n - p)/chi-square(n - p)): what the residuals of a fit leave open of sigma. */
export function drawnSpread(degreesOfFreedom: number, stream: RandomStream): number {
  const half = 0.5 * degreesOfFreedom;
  return Math.sqrt(half / gammaDraw(half, stream));
}

/**
 * A multivariate t around the estimates: normal by the covariance, widened by the uncertainty of sigma^2.
 *
 * @param drawn - which unknowns are drawn; the others stay at their estimates.
 * @param covariance - of those drawn, row-major, by sigma^2 = RSS/(n - p).
 * @returns undefined where the covariance is not positive definite.
 */
export function parametersDraw(
  estimates: Float64Array,
  drawn: readonly number[],
  covariance: Float64Array,
  degreesOfFreedom: number,
): ParametersDraw | undefined {
  const size = drawn.length;
  const factor = choleskyFactor(covariance, size);
  if (factor === undefined) return undefined;
  const normals = new Float64Array(size);
  return (stream, out) => {
    for (let i = 0; i < size; i++) normals[i] = stream.normal();
    const widen = drawnSpread(degreesOfFreedom, stream);
    out.set(estimates);
    drawn.forEach((unknown, i) => {
      let sum = 0;
      for (let k = 0; k <= i; k++) sum += factor[i * size + k]! * normals[k]!;
      out[unknown] = estimates[unknown]! + widen * sum;
    });
    return widen;
  };
}
