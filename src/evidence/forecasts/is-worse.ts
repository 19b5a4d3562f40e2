/**
 * Whether one forecaster's scores lie above another's on the same values, by more than so many standard errors of the
 * mean difference.
 */
export function isWorse(scores: readonly number[], others: readonly number[], errors: number): boolean {
  const differences = scores.map((score, i) => score - others[i]!);
  const count = differences.length;
  const mean = differences.reduce((sum, value) => sum + value, 0) / count;
  const squares = differences.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return count > 3 && mean > errors * Math.sqrt(squares / (count - 1) / count);
}
