import { plus, type Rational, rational, times, toNumber, zero } from "../exact/rational.js";
import { type Complex, complex, powerC, solveC, timesC } from "./complex.js";
import type { LinearStep } from "./exact-matrix.js";
import { type ClosedRoot, matrixRoots } from "./polynomial-roots.js";

/** One term of a closed form: coefficient * t^power * root^t. A root zero gives its coefficient at t = power only. */
export interface ClosedTerm {
  readonly root: ClosedRoot;
  readonly power: number;
  readonly coefficient: Complex;
}

/** The step with the amount added made part of the matrix, by a value that stays 1. */
function homogeneous({ matrix, added }: LinearStep): readonly (readonly Rational[])[] {
  if (added.every((value) => value.numerator === 0n)) return matrix;
  const last = [...added.map(() => zero), rational(1n)];
  return [...matrix.map((row, i) => [...row, added[i]!]), last];
}

function basis(root: ClosedRoot, power: number, t: number): Complex {
  if (root.modulus === 0) return complex(t === power ? 1 : 0);
  const scale = power === 0 ? 1 : t ** power;
  return timesC(complex(scale), powerC(root, t));
}

/** The first values of each slot, exactly. */
function firstValues(
  matrix: readonly (readonly Rational[])[],
  start: readonly Rational[],
): readonly (readonly Rational[])[] {
  const rows = [start];
  for (let t = 1; t < matrix.length; t++) {
    const before = rows[t - 1]!;
    rows.push(matrix.map((row) => row.reduce((sum, value, j) => plus(sum, times(value, before[j]!)), zero)));
  }
  return rows;
}

/** Roots of a linear step, and the terms that make up each of its first `states` slots from a start. */
export function closedTerms(
  step: LinearStep,
  start: readonly Rational[],
  states: number,
): { roots: readonly ClosedRoot[]; terms: readonly (readonly ClosedTerm[])[] } {
  const matrix = homogeneous(step);
  const full = matrix.length > start.length ? [...start, rational(1n)] : start;
  const roots = matrixRoots(matrix);
  const kinds = roots.flatMap((root) => Array.from({ length: root.times }, (_, power) => ({ root, power })));
  const table = matrix.map((_, t) => kinds.map(({ root, power }) => basis(root, power, t)));
  const values = firstValues(matrix, full);
  const terms = Array.from({ length: states }, (_, slot) => {
    const right = values.map((row) => complex(toNumber(row[slot]!)));
    const coefficients = solveC(table, right);
    const largest = Math.max(...coefficients.map(({ re, im }) => Math.hypot(re, im)));
    return kinds
      .map((kind, i) => ({ ...kind, coefficient: coefficients[i]! }))
      .filter(({ coefficient: { re, im } }) => Math.hypot(re, im) > 1e-13 * largest);
  });
  return { roots, terms };
}

/** The value of a closed form after t steps. */
export function termsAt(terms: readonly ClosedTerm[], t: number): number {
  return terms.reduce(
    (sum, { root, power, coefficient }) => sum + timesC(coefficient, basis(root, power, t)).re,
    0,
  );
}
