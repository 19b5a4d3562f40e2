import { stirlingError } from "./log-gamma.js";

/**
 * Probability of the count in a Poisson distribution, x^c e^-x / Gamma(c + 1) with x the mean, also for counts that are
 * not whole: the incomplete gamma function begins with it.
 *
 * @see Loader (2000), Fast and Accurate Computation of Binomial Probabilities: Stirling's formula with its error and
 *   the deviance apart, so that no large logarithms cancel.
 */
export function poissonProbability(count: number, mean: number): number {
  if (count === 0) return Math.exp(-mean);
  return (
    (Math.exp(-stirlingError(count) - halfDeviance(count, mean)) * Math.sqrt(1 / (2 * Math.PI))) /
    Math.sqrt(count)
  );
}

/**
 * Probability of so many successes and failures in a binomial distribution, p and q being the chances of either, also
 * for numbers that are not whole: the incomplete beta function begins with it.
 */
export function binomialProbability(successes: number, failures: number, p: number, q: number): number {
  if (successes === 0) return power(q, p, failures);
  if (failures === 0) return power(p, q, successes);
  const trials = successes + failures;
  const stirling = stirlingError(trials) - stirlingError(successes) - stirlingError(failures);
  const deviance = halfDeviance(successes, trials * p) + halfDeviance(failures, trials * q);
  return Math.exp(stirling - deviance) * Math.sqrt(trials / (2 * Math.PI * successes) / failures);
}

/** base^exponent, through the complement of the base where that is the smaller one and keeps its digits. */
function power(base: number, complement: number, exponent: number): number {
  return complement < 0.5 ? Math.exp(exponent * Math.log1p(-complement)) : base ** exponent;
}

/** x ln(x/m) + m - x, without cancellation where x is near m. */
function halfDeviance(x: number, m: number): number {
  const apart = x - m;
  if (Math.abs(apart) > 0.1 * (x + m)) return x * Math.log(x / m) - apart;
  const share = apart / (x + m);
  let sum = apart * share;
  let term = 2 * x * share;
  for (let k = 3; ; k += 2) {
    term *= share * share;
    const next = sum + term / k;
    if (next === sum) return sum;
    sum = next;
  }
}
