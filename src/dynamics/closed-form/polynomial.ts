import {
  isZero,
  minus,
  over,
  plus,
  type Rational,
  rational,
  times,
  toNumber,
  zero,
} from "../exact/rational.js";

/** Coefficients from the constant term up; the last is not zero, the zero polynomial has none. */
export type Polynomial = readonly Rational[];

const trimmed = (coefficients: readonly Rational[]): Polynomial => {
  let length = coefficients.length;
  while (length > 0 && isZero(coefficients[length - 1]!)) length--;
  return coefficients.slice(0, length);
};

export const degree = (p: Polynomial): number => p.length - 1;

export const subtract = (p: Polynomial, q: Polynomial): Polynomial =>
  trimmed(Array.from({ length: Math.max(p.length, q.length) }, (_, i) => minus(p[i] ?? zero, q[i] ?? zero)));

/** Quotient and remainder. */
export function divide(p: Polynomial, q: Polynomial): { quotient: Polynomial; remainder: Polynomial } {
  const rest = [...p];
  const quotient: Rational[] = new Array(Math.max(0, p.length - q.length + 1)).fill(zero);
  for (let shift = p.length - q.length; shift >= 0; shift--) {
    const factor = over(rest[shift + q.length - 1]!, q.at(-1)!);
    quotient[shift] = factor;
    q.forEach((coefficient, i) => {
      rest[shift + i] = minus(rest[shift + i]!, times(factor, coefficient));
    });
  }
  return { quotient: trimmed(quotient), remainder: trimmed(rest) };
}

const monic = (p: Polynomial): Polynomial => p.map((coefficient) => over(coefficient, p.at(-1)!));

export function greatestCommon(p: Polynomial, q: Polynomial): Polynomial {
  let [a, b] = [p, q];
  while (b.length > 0) [a, b] = [b, divide(a, b).remainder];
  return monic(a);
}

export const derivative = (p: Polynomial): Polynomial =>
  trimmed(p.slice(1).map((coefficient, i) => times(coefficient, rational(BigInt(i + 1)))));

export const valueAt = (p: Polynomial, x: Rational): Rational =>
  p.reduceRight((sum, coefficient) => plus(times(sum, x), coefficient), zero);

export const asNumbers = (p: Polynomial): readonly number[] => p.map(toNumber);

/**
 * Factors without repeated roots, by how often their roots occur: p = f1 f2^2 f3^3 ...
 *
 * @see Yun (1976), On square-free decomposition algorithms, SYMSAC.
 */
export function squareFreeFactors(p: Polynomial): readonly { factor: Polynomial; times: number }[] {
  const factors: { factor: Polynomial; times: number }[] = [];
  const first = derivative(p);
  const common = greatestCommon(p, first);
  let b = divide(p, common).quotient;
  let d = subtract(divide(first, common).quotient, derivative(b));
  for (let count = 1; degree(b) > 0; count++) {
    const factor = d.length === 0 ? monic(b) : greatestCommon(b, d);
    b = divide(b, factor).quotient;
    d = subtract(d.length === 0 ? [] : divide(d, factor).quotient, derivative(b));
    if (degree(factor) > 0) factors.push({ factor, times: count });
  }
  return factors;
}

/**
 * The characteristic polynomial of a matrix of fractions.
 *
 * @see Faddeev and Faddeeva (1963), Computational Methods of Linear Algebra, section 47 (the Leverrier-Faddeev method).
 */
export function characteristic(matrix: readonly (readonly Rational[])[]): Polynomial {
  const size = matrix.length;
  const coefficients: Rational[] = new Array(size + 1).fill(zero);
  coefficients[size] = rational(1n);
  let power = matrix.map((row) => row.map(() => zero));
  for (let k = 1; k <= size; k++) {
    const shifted = power.map((row, i) =>
      row.map((value, j) => (i === j ? plus(value, coefficients[size - k + 1]!) : value)),
    );
    power = matrix.map((row) =>
      row.map((_, j) => row.reduce((sum, value, m) => plus(sum, times(value, shifted[m]![j]!)), zero)),
    );
    const trace = power.reduce((sum, row, i) => plus(sum, row[i]!), zero);
    coefficients[size - k] = over(trace, rational(BigInt(-k)));
  }
  return trimmed(coefficients);
}
