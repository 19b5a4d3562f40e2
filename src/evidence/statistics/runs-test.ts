/** Runs of residuals of one sign, and how unusual their number is. */
export interface RunsTest {
  readonly runs: number;
  readonly above: number;
  readonly below: number;
  /** Runs expected if the signs came in random order. */
  readonly expected: number;
  /** Two-sided, exact. */
  readonly probability: number;
}

/**
 * Whether the signs of residuals come in random order: the number of runs of one sign, given how many are above
 * and below zero. Residuals that are exactly zero are passed over.
 *
 * @see Wald, A. and Wolfowitz, J. (1940), Annals of Mathematical Statistics 11; exact probabilities as tabulated
 *   by Swed, F. S. and Eisenhart, C. (1943), same journal 14.
 */
export function runsTest(residuals: ArrayLike<number>): RunsTest {
  const signs = Array.from(residuals, Math.sign).filter((sign) => sign === 1 || sign === -1);
  const above = signs.filter((sign) => sign > 0).length;
  const below = signs.length - above;
  const runs = signs.filter((sign, i) => sign !== signs[i - 1]).length;
  const expected = signs.length === 0 ? 0 : 1 + (2 * above * below) / signs.length;
  const lower = runsAtMost(runs, above, below);
  const upper = 1 - runsAtMost(runs - 1, above, below);
  return { runs, above, below, expected, probability: Math.min(1, 2 * Math.min(lower, upper)) };
}

/** Probability of at most `most` runs among `above` and `below` signs in random order. */
export function runsAtMost(most: number, above: number, below: number): number {
  if (above === 0 || below === 0) return most >= 1 ? 1 : 0;
  const whole = logChoose(above + below, above);
  const share = (a: number, b: number): number =>
    Math.exp(logChoose(above - 1, a - 1) + logChoose(below - 1, b - 1) - whole);
  let sum = 0;
  for (let runs = 2; runs <= Math.min(most, above + below); runs++) {
    const half = Math.floor(runs / 2);
    sum += runs % 2 === 0 ? 2 * share(half, half) : share(half + 1, half) + share(half, half + 1);
  }
  return Math.min(1, sum);
}

/** Logarithm of "n choose k"; minus infinity where there is no such choice. */
function logChoose(n: number, k: number): number {
  if (k < 0 || k > n) return Number.NEGATIVE_INFINITY;
  let sum = 0;
  for (let i = 1; i <= k; i++) sum += Math.log((n - k + i) / i);
  return sum;
}
