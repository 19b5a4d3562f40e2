import {
  chiSquareCdf,
  chiSquareUpperTail,
  fCdf,
  gammaDraw,
  logGamma,
  normalCdf,
  poissonDraw,
  type RandomStream,
} from "../../numeric/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { type Scale, scaleOf } from "./scale.js";

/** One compared value: what was recorded, what the rule gives, and how exactly it was read. */
export interface ComparedValue {
  readonly observed: number;
  readonly fitted: number;
  /** 0 exact, -1 known to be at or below the value, 1 at or above it. */
  readonly censoring: number;
  /** Root of its weight. */
  readonly root: number;
}

/**
 * How single values scatter around what the rule gives. `spread` is the standard deviation of normal errors or the
 * dispersion of counts, of which one family has none.
 */
export interface ErrorFamily {
  /** Names of the spreads that a likelihood finds from the record. */
  readonly spreads: readonly string[];
  /** Whether values are counts, whose distribution has steps. */
  readonly counts: boolean;
  readonly logLikelihood: (value: ComparedValue, spread: number) => number;
  /** Observed minus fitted in standard deviations. */
  readonly pearson: (value: ComparedValue, spread: number) => number;
  /** Probability of a value up to the one observed; of counts also of one below it. */
  readonly cumulative: (value: ComparedValue, spread: number) => readonly [number, number];
  /** A value drawn around the fitted one. */
  readonly draw: (fitted: number, root: number, spread: number, stream: RandomStream) => number;
}

/** The family that the options name. */
export function errorFamily(options: FitOptions): ErrorFamily {
  if (options.distribution === "poisson") return poissonFamily;
  if (options.distribution === "negative-binomial") return negativeBinomialFamily;
  return normalFamily(scaleOf(options), options.sd !== undefined);
}

const logRootTwoPi = 0.5 * Math.log(2 * Math.PI);

/** Normal errors on a scale; a standard deviation that is known is part of the weights. */
function normalFamily({ to, from }: Scale, known: boolean): ErrorFamily {
  const sdOf = (root: number, spread: number): number => (known ? 1 : spread) / root;
  const deviation = ({ observed, fitted, root }: ComparedValue, spread: number): number =>
    (to(observed) - to(fitted)) / sdOf(root, spread);
  return {
    spreads: known ? [] : ["sigma"],
    counts: false,
    logLikelihood(value, spread) {
      const z = deviation(value, spread);
      if (value.censoring === 0) return -0.5 * z * z - Math.log(sdOf(value.root, spread)) - logRootTwoPi;
      return logNormalCdf(value.censoring < 0 ? z : -z);
    },
    pearson: deviation,
    cumulative(value, spread) {
      const share = normalCdf(deviation(value, spread));
      return [share, share];
    },
    draw: (fitted, root, spread, stream) => from(to(fitted) + sdOf(root, spread) * stream.normal()),
  };
}

/** Logarithm of the normal distribution function, by its asymptotic series where the function itself underflows. */
function logNormalCdf(z: number): number {
  if (z > -20) return Math.log(normalCdf(z));
  const s = 1 / (z * z);
  return -0.5 * z * z - Math.log(-z) - logRootTwoPi + Math.log1p(-s * (1 - 3 * s * (1 - 5 * s)));
}

/** Counts with variance equal to the mean; a row's weight multiplies its log-likelihood, so that 2 counts it twice. */
const poissonFamily: ErrorFamily = {
  spreads: [],
  counts: true,
  logLikelihood: ({ observed, fitted, censoring, root }) =>
    fitted > 0 ? root * root * logPoisson(observed, fitted, censoring) : Number.NEGATIVE_INFINITY,
  pearson: ({ observed, fitted, root }) => (root * (observed - fitted)) / Math.sqrt(fitted),
  cumulative: ({ observed, fitted }) => [
    observed < 1 ? 0 : chiSquareUpperTail(2 * fitted, 2 * observed),
    chiSquareUpperTail(2 * fitted, 2 * (observed + 1)),
  ],
  draw: (fitted, _root, _spread, stream) => poissonDraw(fitted, stream),
};

/** Of a count, or of counts up to (-1) or from (1) it on; the limit itself belongs to both. */
function logPoisson(count: number, mean: number, censoring: number): number {
  if (censoring === 0) return count * Math.log(mean) - mean - logGamma(count + 1);
  // P(Y >= y; mean) is the chi-square probability of 2 mean with 2 y degrees of freedom.
  if (censoring > 0) return count === 0 ? 0 : Math.log(chiSquareCdf(2 * mean, 2 * count));
  return Math.log(chiSquareUpperTail(2 * mean, 2 * (count + 1)));
}

/** Counts with variance mean + dispersion * mean^2. */
const negativeBinomialFamily: ErrorFamily = {
  spreads: ["dispersion"],
  counts: true,
  logLikelihood: ({ observed, fitted, censoring, root }, dispersion) =>
    fitted > 0
      ? root * root * logNegativeBinomial(observed, fitted, censoring, dispersion)
      : Number.NEGATIVE_INFINITY,
  pearson: ({ observed, fitted, root }, dispersion) =>
    (root * (observed - fitted)) / Math.sqrt(fitted + dispersion * fitted * fitted),
  cumulative: ({ observed, fitted }, dispersion) => [
    observed < 1 ? 0 : countsUpTo(observed - 1, fitted, dispersion),
    countsUpTo(observed, fitted, dispersion),
  ],
  draw: (fitted, _root, dispersion, stream) =>
    poissonDraw(fitted * dispersion * gammaDraw(1 / dispersion, stream), stream),
};

/**
 * Probability of a count up to k: the incomplete beta function as the F distribution gives it.
 *
 * @see Johnson, Kemp and Kotz (2005), Univariate Discrete Distributions, 3rd ed., section 5.6.
 */
function countsUpTo(k: number, mean: number, dispersion: number): number {
  return fCdf((k + 1) / mean, 2 / dispersion, 2 * (k + 1));
}

function logNegativeBinomial(count: number, mean: number, censoring: number, dispersion: number): number {
  if (censoring < 0) return Math.log(countsUpTo(count, mean, dispersion));
  // P(Y >= y) from its own side, which keeps its digits where it is small.
  if (censoring > 0) return count === 0 ? 0 : Math.log(fCdf(mean / count, 2 * count, 2 / dispersion));
  const size = 1 / dispersion;
  const spreadOut = logRising(count, size);
  return (
    spreadOut - logGamma(count + 1) + count * Math.log(mean) - (count + size) * Math.log1p(mean * dispersion)
  );
}

/**
 * ln of the product of 1 + k/size for k from 0 to count - 1: a difference of two logarithms of the gamma function, which
 * cancel for a large size. Stirling's series of that difference keeps its digits there.
 */
function logRising(count: number, size: number): number {
  if (count <= 12) {
    let sum = 0;
    for (let k = 1; k < count; k++) sum += Math.log1p(k / size);
    return sum;
  }
  if (size < 20) return logGamma(count + size) - logGamma(size) - count * Math.log(size);
  const end = size + count;
  const correction = (one: number): number => {
    const s = 1 / (one * one);
    return (1 / 12 - s * (1 / 360 - s * (1 / 1260 - s / 1680))) / one;
  };
  return (end - 0.5) * Math.log1p(count / size) - count + correction(end) - correction(size);
}
