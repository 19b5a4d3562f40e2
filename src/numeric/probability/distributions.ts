import {
  betaShape,
  exponentialShape,
  fShape,
  gammaShape,
  lognormalShape,
  normalShape,
  type Shape,
  studentShape,
  uniformShape,
} from "./continuous.js";
import { binomialShape, negativeBinomialShape, poissonShape } from "./counts.js";
import { type Distribution, family, type Requirement } from "./distribution.js";

/** Functions that take the parameters of a distribution and give its density, tails and quantiles. */
export interface Distributions {
  /** Normal distribution; mean 0 and standard deviation 1 when not given. @param sd - above 0. */
  readonly normal: (mean?: number, sd?: number) => Distribution;
  /** Values whose natural logarithms are normal. @param sdLog - standard deviation of the logarithm, above 0. */
  readonly lognormal: (meanLog?: number, sdLog?: number) => Distribution;
  /** Student's t distribution. @param degreesOfFreedom - above 0. */
  readonly t: (degreesOfFreedom: number) => Distribution;
  /** Chi-square distribution. @param degreesOfFreedom - above 0. */
  readonly chiSquare: (degreesOfFreedom: number) => Distribution;
  /** F distribution. @param numerator, denominator - degrees of freedom of both variances, above 0. */
  readonly f: (numerator: number, denominator: number) => Distribution;
  /** Gamma distribution with mean shape * scale. @param scale - in the unit of the value, above 0. */
  readonly gamma: (shape: number, scale: number) => Distribution;
  /** Exponential distribution. @param mean - in the unit of the value, above 0. */
  readonly exponential: (mean: number) => Distribution;
  /** Beta distribution with mean a / (a + b). @param a, b - above 0. */
  readonly beta: (a: number, b: number) => Distribution;
  /** Uniform distribution. @param high - above low. */
  readonly uniform: (low?: number, high?: number) => Distribution;
  /** Poisson distribution. @param mean - at least 0. */
  readonly poisson: (mean: number) => Distribution;
  /** Successes among `size` trials. @param probability - of a success in one trial, from 0 to 1. */
  readonly binomial: (size: number, probability: number) => Distribution;
  /** Negative binomial distribution with variance mean + mean^2 / size. @param size - above 0, not always whole. */
  readonly negativeBinomial: (mean: number, size: number) => Distribution;
}

const finite = (example: number): Requirement => ({
  met: Number.isFinite,
  words: "a finite number",
  example,
});
const positive = (example: number): Requirement => ({
  met: (value) => value > 0 && Number.isFinite(value),
  words: "a finite number above 0",
  example,
});
const notNegative = (example: number): Requirement => ({
  met: (value) => value >= 0 && Number.isFinite(value),
  words: "a finite number, at least 0",
  example,
});
const trials: Requirement = {
  met: (value) => Number.isSafeInteger(value) && value >= 0,
  words: "a whole number, at least 0",
  example: 20,
};
const share: Requirement = {
  met: (value) => value >= 0 && value <= 1,
  words: "a number from 0 to 1",
  example: 0.3,
};
const aboveLow: Requirement = {
  met: (value, [low]) => value > low! && Number.isFinite(value - low!),
  words: "a finite number above `low`",
  example: 1,
};

const normal = family("normal", normalShape, { mean: finite(0), sd: positive(1) });
const lognormal = family("lognormal", lognormalShape, { meanLog: finite(0), sdLog: positive(0.2) });
const chiSquareShape = (degreesOfFreedom: number): Shape => gammaShape(degreesOfFreedom / 2, 2);
const uniform = family("uniform", uniformShape, { low: finite(0), high: aboveLow });

/**
 * Probability distributions with density, cumulative probability, upper tail and quantiles; either tail is computed
 * itself, so that a probability of 1e-200 has its digits too.
 *
 * @throws {ModelError} `bad-distribution-parameter`, `bad-probability`, `bad-value`.
 * @see Loader (2000), Fast and Accurate Computation of Binomial Probabilities; Didonato and Morris (1992), ACM TOMS
 *   18:360; Abramowitz and Stegun (1964), Handbook of Mathematical Functions, chapters 6 and 26.
 * @example distributions.poisson(4).quantile(0.95); // 8
 */
export const distributions: Distributions = Object.freeze({
  normal: (mean = 0, sd = 1) => normal(mean, sd),
  lognormal: (meanLog = 0, sdLog = 1) => lognormal(meanLog, sdLog),
  t: family("t", studentShape, { degreesOfFreedom: positive(10) }),
  chiSquare: family("chiSquare", chiSquareShape, { degreesOfFreedom: positive(3) }),
  f: family("f", fShape, { numerator: positive(2), denominator: positive(20) }),
  gamma: family("gamma", gammaShape, { shape: positive(2), scale: positive(5) }),
  exponential: family("exponential", exponentialShape, { mean: positive(5) }),
  beta: family("beta", betaShape, { a: positive(2), b: positive(5) }),
  uniform: (low = 0, high = 1) => uniform(low, high),
  poisson: family("poisson", poissonShape, { mean: notNegative(4) }),
  binomial: family("binomial", binomialShape, { size: trials, probability: share }),
  negativeBinomial: family("negativeBinomial", negativeBinomialShape, {
    mean: notNegative(4),
    size: positive(2),
  }),
});
