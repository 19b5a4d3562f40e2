import { choleskyFactor, gammaDraw, type RandomStream } from "../../numeric/index.js";

/** What is known of a draw of the unknowns beside its values. */
export interface DrawnUnknowns {
  /** The drawn sigma as a multiple of the estimated one. */
  readonly sigma: number;
  /** Squared distance from the estimates by the covariance: what the increase of the objective would be, were it quadratic. */
  readonly distance: number;
}

/** Draws unknowns of a fit around their estimates; writes them into `out`. */
export type ParametersDraw = (stream: RandomStream, out: Float64Array) => DrawnUnknowns;

/**
 * How likely the unknowns of a draw are by the record, over how likely they were to be drawn: what the record says of
 * unknowns at which its objective increases by so much, against the multivariate t of the draws.
 *
 * @param increase - in units of sigma^2, or of twice the log-likelihood.
 * @param size - how many unknowns are drawn.
 * @param exact - whether sigma is that of least squares, so that the record's own density is of the same t form.
 * @see Box and Tiao (1973), Bayesian Inference in Statistical Analysis, section 8.2, for the t form in the sum of squares
 *   (from memory).
 */
export function recordRatio(
  increase: number,
  { distance }: DrawnUnknowns,
  degreesOfFreedom: number,
  size: number,
  exact: boolean,
): number {
  const power = 0.5 * (degreesOfFreedom + size);
  const drawn = power * Math.log1p(distance / degreesOfFreedom);
  const said = exact ? power * Math.log1p(increase / degreesOfFreedom) : 0.5 * increase;
  return Math.exp(drawn - said);
}

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
    let squares = 0;
    drawn.forEach((unknown, i) => {
      squares += normals[i]! * normals[i]!;
      let sum = 0;
      for (let k = 0; k <= i; k++) sum += factor[i * size + k]! * normals[k]!;
      out[unknown] = estimates[unknown]! + widen * sum;
    });
    return { sigma: widen, distance: widen * widen * squares };
  };
}
