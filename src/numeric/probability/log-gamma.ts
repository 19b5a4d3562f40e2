/** Coefficients of Stirling's series, 1/12, -1/360, ... */
const series = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156];
/** From here on the series keeps every digit. */
const far = 12;
const halfLogTwoPi = 0.5 * Math.log(2 * Math.PI);

/** What Stirling's formula (x + 1/2) ln x - x + ln(2 pi)/2 lacks of ln Gamma(x + 1), for x > 0. */
export function stirlingError(value: number): number {
  let x = value;
  let error = 0;
  // Each step of the recurrence is near 1/(12 x^2): nothing large is added and taken away again.
  for (; x < far; x++) error += (x + 0.5) * Math.log1p(1 / x) - 1;
  const inverse = 1 / (x * x);
  let sum = 0;
  for (let k = series.length - 1; k >= 0; k--) sum = sum * inverse + series[k]!;
  return error + sum / x;
}

/**
 * Logarithm of the gamma function for positive arguments, by Stirling's series.
 *
 * @see Abramowitz and Stegun (1964), Handbook of Mathematical Functions, formula 6.1.41.
 * @example logGamma(5); // ln 24 = 3.1780538303479458
 */
export function logGamma(value: number): number {
  let x = value;
  let product = 1;
  while (x < far) product *= x++;
  return (x - 0.5) * Math.log(x) - x + halfLogTwoPi + stirlingError(x) - Math.log(product);
}
