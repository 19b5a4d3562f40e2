/** Coefficients of Stirling's series, 1/12, -1/360, ... */
const series = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];

/**
 * Logarithm of the gamma function for positive arguments: Stirling's series, reached by the recurrence from small ones.
 *
 * @see Abramowitz and Stegun (1964), Handbook of Mathematical Functions, formula 6.1.41.
 * @example logGamma(5); // ln 24 = 3.1780538303479458
 */
export function logGamma(value: number): number {
  let x = value;
  let product = 1;
  while (x < 12) product *= x++;
  let sum = 0;
  const inverse = 1 / (x * x);
  for (let k = series.length - 1; k >= 0; k--) sum = sum * inverse + series[k]!;
  return (x - 0.5) * Math.log(x) - x + 0.5 * Math.log(2 * Math.PI) + sum / x - Math.log(product);
}
