import { minimiseSquares } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";
import { prepared } from "../systems/prepared.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";

/** Residuals beyond this many robust standard deviations lose weight: 95% as good as least squares for normal errors. */
const bend = 1.345;
/** Median absolute deviation of a standard normal value. */
const normalDeviation = 0.6744897501960817;
const rounds = 50;
const settled = 1e-8;

/**
 * Weights of the rows of a group at which far-off values no longer decide the fit: Huber's, found by fitting again and
 * again with the weights that the residuals of the fit before ask for.
 *
 * @param start - where the first fit begins.
 * @returns the group with its weights multiplied by them, and the weights [rows], 1 where a row counts in full.
 * @see Huber and Ronchetti (2009), Robust Statistics, 2nd ed., sections 7.8 and 4.5 for the constant 1.345.
 */
export function robustWeights(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  start: Float64Array,
): { readonly group: ObservedGroup; readonly weights: Float64Array } {
  const unknowns = unknownsOf(rule, options);
  const plain = group.weights ?? new Float64Array(group.index.length).fill(1);
  const weights = new Float64Array(group.index.length).fill(1);
  let at = start;
  let weighted = group;
  for (let round = 0; round < rounds; round++) {
    const before = at;
    at = fitted(rule, weighted, options, unknowns, at);
    const { rows } = prepared(rule, group, unknowns, options);
    takeWeights(rows, at, weights);
    weighted = { ...group, weights: plain.map((weight, entry) => weight * weights[entry]!) };
    if (at.every((value, i) => Math.abs(value - before[i]!) <= settled * Math.abs(value))) break;
  }
  return { group: weighted, weights };
}

function fitted(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  start: Float64Array,
): Float64Array {
  const { system } = prepared(rule, group, unknowns, options);
  const { lower, upper } = unknowns;
  return minimiseSquares(system, start, { lower, upper }).estimates;
}

/** Huber's weights of the residuals; of several values in a row the least. */
function takeWeights(rows: FitRows, at: Float64Array, weights: Float64Array): void {
  rows.prepare(at, false);
  const sizes = Float64Array.from({ length: rows.count }, (_, i) => Math.abs(rows.residualAt(i)));
  const scale = sizes.slice().sort()[sizes.length >> 1]! / normalDeviation;
  weights.fill(1);
  sizes.forEach((size, i) => {
    const entry = rows.entries[i]!;
    if (size > bend * scale) weights[entry] = Math.min(weights[entry]!, (bend * scale) / size);
  });
}
