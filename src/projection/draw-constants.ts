import { choleskyFactor, type RandomStream } from "../numeric/index.js";

/** Draws unknowns of a fit around their estimates; writes into `out`. */
export type ConstantsDraw = (stream: RandomStream, out: Float64Array) => void;

/**
 * A multivariate t around the estimates: normal by the covariance, widened by the uncertainty of sigma^2.
 *
 * @param covariance - [size, size] row-major, by sigma^2 = RSS/(n - p).
 * @returns undefined where the covariance is not positive definite.
 */
export function constantsDraw(
  estimates: Float64Array,
  covariance: Float64Array,
  degreesOfFreedom: number,
): ConstantsDraw | undefined {
  const size = estimates.length;
  const factor = choleskyFactor(covariance, size);
  if (factor === undefined) return undefined;
  const normals = new Float64Array(size);
  return (stream, out) => {
    for (let i = 0; i < size; i++) normals[i] = stream.normal();
    const widen = Math.sqrt(degreesOfFreedom / chiSquareDraw(stream, degreesOfFreedom));
    for (let i = 0; i < size; i++) {
      let sum = 0;
      for (let k = 0; k <= i; k++) sum += factor[i * size + k]! * normals[k]!;
      out[i] = estimates[i]! + widen * sum;
    }
  };
}

/** Sum of squared normals; beyond 200 degrees of freedom by the cube-root normal of Wilson and Hilferty (1931). */
function chiSquareDraw(stream: RandomStream, degreesOfFreedom: number): number {
  if (degreesOfFreedom > 200) {
    const spread = 2 / (9 * degreesOfFreedom);
    return degreesOfFreedom * (1 - spread + Math.sqrt(spread) * stream.normal()) ** 3;
  }
  let sum = 0;
  for (let i = 0; i < degreesOfFreedom; i++) sum += stream.normal() ** 2;
  return sum;
}
