import { normalCdf, normalQuantile } from "../../numeric/index.js";

/** W, near 1 for a normal sample, and the probability of one as small. */
export interface NormalityTest {
  readonly statistic: number;
  readonly probability: number;
}

/** Polynomial with the constant term first. */
const at = (coefficients: readonly number[], x: number): number =>
  coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);

/**
 * Whether a sample may come from a normal distribution: W = (sum a_i x_(i))^2 / sum (x_i - mean)^2.
 *
 * @param sample - 3 to 5000 values, not all equal; undefined otherwise.
 * @see Shapiro, S. S. and Wilk, M. B. (1965), Biometrika 52; weights and probability by Royston, P. (1995), Remark
 *   AS R94, Applied Statistics 44.
 */
export function shapiroWilk(sample: ArrayLike<number>): NormalityTest | undefined {
  const x = Float64Array.from(sample).sort();
  const n = x.length;
  if (n < 3 || n > 5000 || x[0] === x[n - 1]) return undefined;
  const weights = upperWeights(n);
  const mean = x.reduce((sum, value) => sum + value, 0) / n;
  const squares = x.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const contrast = weights.reduce((sum, weight, i) => sum + weight * (x[n - 1 - i]! - x[i]!), 0);
  const statistic = Math.min(1, contrast ** 2 / squares);
  return { statistic, probability: upperTail(statistic, n) };
}

/** Weights of the largest values, largest first; those of the smallest are their negatives. */
function upperWeights(n: number): number[] {
  if (n === 3) return [Math.SQRT1_2];
  const half = n >> 1;
  const scores = Array.from({ length: half }, (_, i) => -normalQuantile((i + 1 - 0.375) / (n + 0.25)));
  const squares = 2 * scores.reduce((sum, score) => sum + score * score, 0);
  const root = Math.sqrt(squares);
  const x = 1 / Math.sqrt(n);
  const first = scores[0]! / root + at([0, 0.221157, -0.147981, -2.07119, 4.434685, -2.706056], x);
  const second = scores[1]! / root + at([0, 0.042981, -0.293762, -1.752461, 5.682633, -3.582633], x);
  const corrected = n > 5 ? [first, second] : [first];
  const left = corrected.reduce((sum, _, i) => sum - 2 * scores[i]! ** 2, squares);
  const room = corrected.reduce((sum, weight) => sum - 2 * weight ** 2, 1);
  const divisor = Math.sqrt(left / room);
  return scores.map((score, i) => corrected[i] ?? score / divisor);
}

function upperTail(statistic: number, n: number): number {
  if (n === 3)
    return Math.max(0, (6 / Math.PI) * (Math.asin(Math.sqrt(statistic)) - Math.asin(Math.sqrt(0.75))));
  const y = Math.log(1 - statistic);
  if (n > 11) {
    const size = Math.log(n);
    const mean = at([-1.5861, -0.31082, -0.083751, 0.0038915], size);
    const deviation = Math.exp(at([-0.4803, -0.082676, 0.0030302], size));
    return normalCdf((mean - y) / deviation);
  }
  const limit = 0.459 * n - 2.273;
  if (y >= limit) return 0;
  const mean = at([0.544, -0.39978, 0.025054, -6.714e-4], n);
  const deviation = Math.exp(at([1.3822, -0.77857, 0.062767, -0.0020322], n));
  return normalCdf((mean + Math.log(limit - y)) / deviation);
}
