import { Matrix, solve } from "ml-matrix";
import { isLinearInStates, type Rule } from "../../rule/index.js";
import { notAMatrixRule } from "../refusals.js";
import { type Multiplier, multipliersOf } from "../rest/multiplier.js";
import { type HeldSetting, holdStep } from "../setting/held-step.js";

/** What a matrix of shares and births does in the long run. */
export interface MatrixGrowth {
  readonly kind: "matrix-growth";
  readonly rule: Rule;
  readonly states: readonly string[];
  /** [to][from] */
  readonly matrix: readonly (readonly number[])[];
  /** Multiplier a period in the long run. */
  readonly dominant: number;
  readonly multipliers: readonly Multiplier[];
  /** Shares of the states in the long run; they sum to 1. */
  readonly structure: readonly number[];
  /** Worth of one of each state for the future, the first state's being 1. */
  readonly reproductiveValues: readonly number[];
  /** Change of the dominant root for a small change of each entry, [to][from]. */
  readonly sensitivities: readonly (readonly number[])[];
  /** The same in proportions; they sum to 1. */
  readonly elasticities: readonly (readonly number[])[];
  /** Dominant root over the size of the next: how fast the stable structure is reached; infinite if there is no next. */
  readonly dampingRatio: number;
  /** The largest growth of the total in one period from any start, and the largest decline: columns' sums. */
  readonly firstPeriod: { readonly most: number; readonly least: number };
}

/** The vector that a matrix multiplies by the root, by inverse iteration from a near root. */
function eigenvector(matrix: Matrix, root: number): readonly number[] {
  const size = matrix.rows;
  const shifted = Matrix.sub(matrix, Matrix.eye(size, size).mul(root * (1 + 1e-10) + 1e-300));
  let vector = new Array<number>(size).fill(1);
  for (let round = 0; round < 4; round++) {
    const next = solve(shifted, Matrix.columnVector(vector)).to1DArray();
    const total = next.reduce((sum, value) => sum + Math.abs(value), 0);
    const sign = next.reduce((sum, value) => sum + value, 0) < 0 ? -1 : 1;
    vector = next.map((value) => (sign * value) / total);
  }
  return vector;
}

/** A root of the matrix found roughly is found to rounding by the quotient of its two vectors. */
function polished(matrix: Matrix, right: readonly number[], left: readonly number[]): number {
  const image = matrix.mmul(Matrix.columnVector([...right])).to1DArray();
  const above = left.reduce((sum, value, i) => sum + value * image[i]!, 0);
  return above / left.reduce((sum, value, i) => sum + value * right[i]!, 0);
}

/**
 * Works out the long run of a matrix rule: dominant root, stable structure, reproductive values, sensitivities,
 * elasticities and damping.
 *
 * @param rule - linear in its states without an amount added, as `rules.ages` and `rules.stages` give.
 * @throws {ModelError} `not-a-matrix-rule` | `missing-value`.
 * @see Caswell (2001), Matrix Population Models, chapters 4 and 9.
 * @example matrixGrowth(rules.ages({ ages: 3 }), { parameters: { f1: 0, f2: 4, f3: 3, s1: 0.5, s2: 0.25 } }).dominant; // 1.5
 */
export function matrixGrowth(rule: Rule, setting: HeldSetting = {}): MatrixGrowth {
  const held = holdStep(rule, setting, "long run");
  const { next, matrix: flat } = held.slopes(new Float64Array(held.width));
  if (!isLinearInStates(rule) || rule.lags.length > 0 || next.some((value) => value !== 0))
    throw notAMatrixRule();
  const size = held.width;
  const rows = Array.from({ length: size }, (_, i) => [...flat.subarray(i * size, (i + 1) * size)]);
  const matrix = new Matrix(rows);
  const multipliers = multipliersOf(flat, size);
  const first = multipliers.find(({ im, re }) => im === 0 && re > 0);
  if (first === undefined) throw notAMatrixRule();
  const right = eigenvector(matrix, first.re);
  const left = eigenvector(matrix.transpose(), first.re);
  const dominant = polished(matrix, right, left);
  const product = right.reduce((sum, value, i) => sum + value * left[i]!, 0);
  const sensitivities = rows.map((row, i) => row.map((_, j) => (left[i]! * right[j]!) / product));
  const second = multipliers.find((one) => one !== first);
  const sums = rows.map((_, j) => rows.reduce((sum, row) => sum + row[j]!, 0));
  return {
    kind: "matrix-growth",
    rule,
    states: rule.states,
    matrix: rows,
    dominant,
    multipliers,
    structure: right,
    reproductiveValues: left.map((value) => value / left[0]!),
    sensitivities,
    elasticities: sensitivities.map((row, i) => row.map((value, j) => (value * rows[i]![j]!) / dominant)),
    dampingRatio:
      second === undefined || second.modulus === 0 ? Number.POSITIVE_INFINITY : dominant / second.modulus,
    firstPeriod: { most: Math.max(...sums), least: Math.min(...sums) },
  };
}
