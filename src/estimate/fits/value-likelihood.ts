import { chiSquareCdf, logGamma, normalCdf } from "../../numeric/index.js";

/** What the likelihood of a value rests on: its fitted value, its censoring, and the spread. */
export interface ValueLikelihood {
  /** Names of the spreads that are found from the record. */
  readonly spreads: readonly string[];
  /**
   * Log-likelihood of a value: observed, or known to be at or below (censoring -1) or at or above it (1), where `fitted`
   * is expected. `root` is the root of its weight.
   */
  readonly of: (observed: number, fitted: number, censoring: number, root: number, spread: number) => number;
}

const logRootTwoPi = 0.5 * Math.log(2 * Math.PI);

/** Normal errors on the natural or the log scale; their standard deviation is found unless it is known. */
export function normalLikelihood(log: boolean, knownSpread: boolean): ValueLikelihood {
  return {
    spreads: knownSpread ? [] : ["sigma"],
    of(observed, fitted, censoring, root, spread) {
      const sd = (knownSpread ? 1 : spread) / root;
      const z = (log ? Math.log(observed) - Math.log(fitted) : observed - fitted) / sd;
      if (censoring === 0) return -0.5 * z * z - Math.log(sd) - logRootTwoPi;
      return Math.log(normalCdf(censoring < 0 ? z : -z));
    },
  };
}

/** Counts with variance equal to the mean; the limits include the value itself, without continuity correction. */
export const poissonLikelihood: ValueLikelihood = {
  spreads: [],
  of(observed, fitted, censoring) {
    if (!(fitted > 0)) return Number.NEGATIVE_INFINITY;
    if (censoring === 0) return observed * Math.log(fitted) - fitted - logGamma(observed + 1);
    // P(Y >= y; mean) is the chi-square probability of 2 mean with 2 y degrees of freedom.
    if (censoring > 0) return observed === 0 ? 0 : Math.log(chiSquareCdf(2 * fitted, 2 * observed));
    return Math.log(1 - chiSquareCdf(2 * fitted, 2 * (observed + 1)));
  },
};

/** Counts with variance mean + dispersion * mean^2. */
export const negativeBinomialLikelihood: ValueLikelihood = {
  spreads: ["dispersion"],
  of(observed, fitted, censoring, _, dispersion) {
    if (!(fitted > 0)) return Number.NEGATIVE_INFINITY;
    if (censoring === 0) return negativeBinomial(observed, fitted, dispersion);
    let below = 0;
    const until = censoring > 0 ? observed - 1 : observed;
    for (let count = 0; count <= until; count++)
      below += Math.exp(negativeBinomial(count, fitted, dispersion));
    return Math.log(censoring > 0 ? 1 - below : below);
  },
};

function negativeBinomial(count: number, mean: number, dispersion: number): number {
  const size = 1 / dispersion;
  // The first two terms as a sum of logarithms where that is exact and cheap: they cancel for a large size.
  let rising = 0;
  if (count <= 1000) for (let k = 0; k < count; k++) rising += Math.log1p(k * dispersion);
  else rising = logGamma(count + size) - logGamma(size) - count * Math.log(size);
  return (
    rising - logGamma(count + 1) + count * Math.log(mean) - (count + size) * Math.log1p(mean * dispersion)
  );
}
