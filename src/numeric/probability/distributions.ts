import chiSquare from "@stdlib/stats-base-dists-chisquare-cdf";
import chiSquareInverse from "@stdlib/stats-base-dists-chisquare-quantile";
import f from "@stdlib/stats-base-dists-f-cdf";
import fInverse from "@stdlib/stats-base-dists-f-quantile";
import normal from "@stdlib/stats-base-dists-normal-cdf";
import normalInverse from "@stdlib/stats-base-dists-normal-quantile";
import student from "@stdlib/stats-base-dists-t-cdf";
import studentInverse from "@stdlib/stats-base-dists-t-quantile";

/** Density of the standard normal distribution. */
export function normalDensity(value: number): number {
  return Math.exp(-0.5 * value * value) / Math.sqrt(2 * Math.PI);
}

/** Probability that a standard normal value is at most `value`. @example normalCdf(0); // 0.5 */
export function normalCdf(value: number): number {
  return normal(value, 0, 1);
}

/**
 * Standard normal quantile. In the far lower tail, where the direct formula loses its digits, it is solved from
 * the distribution function.
 * @example normalQuantile(0.975); // 1.959963984540054
 */
export function normalQuantile(probability: number): number {
  if (!(probability > 0 && probability < 1e-10)) return normalInverse(probability, 0, 1);
  // The tail is nearly density(z)/z; then Newton's iteration on the logarithm, which is nearly a parabola.
  const depth = -2 * Math.log(probability);
  let value = -Math.sqrt(depth - Math.log(2 * Math.PI * depth));
  for (let k = 0; k < 6; k++) {
    const reached = normalCdf(value);
    value -= (Math.log(reached / probability) * reached) / normalDensity(value);
  }
  return value;
}

/** Probability that a Student t value with the degrees of freedom is at most `value`. */
export function studentCdf(value: number, degrees: number): number {
  return student(value, degrees);
}

/** Student t quantile. @example studentQuantile(0.975, 10); // 2.2281388519862744 */
export function studentQuantile(probability: number, degrees: number): number {
  return studentInverse(probability, degrees);
}

/** Probability that an F value is at most `value`. */
export function fCdf(value: number, numerator: number, denominator: number): number {
  return f(value, numerator, denominator);
}

/** F quantile. @example fQuantile(0.95, 1, 10); // 4.964602743730708 */
export function fQuantile(probability: number, numerator: number, denominator: number): number {
  return fInverse(probability, numerator, denominator);
}

/** Probability that a chi-square value is at most `value`. */
export function chiSquareCdf(value: number, degrees: number): number {
  return chiSquare(value, degrees);
}

/** Chi-square quantile. @example chiSquareQuantile(0.95, 1); // 3.8414588206941245 */
export function chiSquareQuantile(probability: number, degrees: number): number {
  return chiSquareInverse(probability, degrees);
}
