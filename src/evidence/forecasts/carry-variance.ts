import type { GroupFit, Scale } from "../../estimate/index.js";
import { compileRule, type Rule } from "../../rule/index.js";

/** Variance that the uncertainty of the parameters gives one cell of a path: g'Cg by its slopes g. */
export function spreadOf(
  group: GroupFit,
  columns: Int32Array,
  slopes: Float64Array,
  cell: number,
  width: number,
): number {
  const size = columns.length;
  let sum = 0;
  for (let a = 0; a < size; a++)
    for (let b = 0; b < size; b++)
      sum +=
        slopes[cell * width + columns[a]!]! *
        group.covariance[a * size + b]! *
        slopes[cell * width + columns[b]!]!;
  return sum;
}

/**
 * Variance that errors of single steps have built up after 1 to `periods` steps, on the fitting scale: P' = F P F' + Q
 * along the path, F the slopes of one step, Q the variance of one error.
 *
 * @param sds - standard deviation of one error, by state.
 * @returns [periods][states].
 */
export function carryVariance(
  rule: Rule,
  { log }: Scale,
  sds: readonly number[],
  start: Float64Array,
  parameters: Float64Array,
  inputs: readonly Float64Array[],
  from: number,
  periods: number,
): readonly Float64Array[] {
  const { pathWithSensitivities } = compileRule(rule);
  const slots = start.length;
  const width = parameters.length + slots;
  const values = new Float64Array(2 * slots);
  const slopes = new Float64Array(2 * slots * width);
  let variance = new Float64Array(slots * slots);
  const state = start.slice();
  return Array.from({ length: periods }, (_, h) => {
    pathWithSensitivities(state, parameters, inputs, from + h, 1, values, slopes);
    state.set(values.subarray(slots));
    const slope = (row: number, column: number): number =>
      slopes[(slots + row) * width + parameters.length + column]!;
    variance = sandwich(slope, variance, slots);
    for (let s = 0; s < rule.states.length; s++)
      variance[s * slots + s] = variance[s * slots + s]! + (sds[s]! * (log ? state[s]! : 1)) ** 2;
    return Float64Array.from(rule.states, (_, s) => variance[s * slots + s]! / (log ? state[s]! ** 2 : 1));
  });
}

function sandwich(
  slope: (row: number, column: number) => number,
  variance: Float64Array,
  size: number,
): Float64Array<ArrayBuffer> {
  const out = new Float64Array(size * size);
  for (let i = 0; i < size; i++)
    for (let j = 0; j < size; j++)
      for (let a = 0; a < size; a++)
        for (let b = 0; b < size; b++)
          out[i * size + j] = out[i * size + j]! + slope(i, a) * variance[a * size + b]! * slope(j, b);
  return out;
}
