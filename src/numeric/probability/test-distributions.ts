import { fShape, gammaShape, studentShape } from "./continuous.js";
import { normalAt } from "./normal.js";

/** Standard normal quantile. @example normalQuantile(0.975); // 1.959963984540054 */
export function normalQuantile(probability: number): number {
  return normalAt(probability, 1 - probability);
}

/** Probability that a Student t value with the degrees of freedom is at most `value`. */
export function studentCdf(value: number, degrees: number): number {
  return studentShape(degrees).tails(value).lower;
}

/** Student t quantile. @example studentQuantile(0.975, 10); // 2.2281388519862744 */
export function studentQuantile(probability: number, degrees: number): number {
  return studentShape(degrees).at({ lower: probability, upper: 1 - probability });
}

/** F quantile. @example fQuantile(0.95, 1, 10); // 4.964602743730711 */
export function fQuantile(probability: number, numerator: number, denominator: number): number {
  return fShape(numerator, denominator).at({ lower: probability, upper: 1 - probability });
}

/** Probability that an F value is at most `value`, with all its digits where it is small. */
export function fCdf(value: number, numerator: number, denominator: number): number {
  return fShape(numerator, denominator).tails(value).lower;
}

/** Probability that an F value is above `value`, with all its digits where it is small. */
export function fUpperTail(value: number, numerator: number, denominator: number): number {
  return fShape(numerator, denominator).tails(value).upper;
}

/** Probability that a chi-square value is at most `value`. */
export function chiSquareCdf(value: number, degrees: number): number {
  return gammaShape(degrees / 2, 2).tails(value).lower;
}

/** Probability that a chi-square value is above `value`, with all its digits where it is small. */
export function chiSquareUpperTail(value: number, degrees: number): number {
  return gammaShape(degrees / 2, 2).tails(value).upper;
}

/** Chi-square quantile. @example chiSquareQuantile(0.95, 1); // 3.841458820694124 */
export function chiSquareQuantile(probability: number, degrees: number): number {
  return gammaShape(degrees / 2, 2).at({ lower: probability, upper: 1 - probability });
}
