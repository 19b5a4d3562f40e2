import { normalCdf, type Warning } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { criteriaOf } from "../result/criteria.js";
import type { FitRows } from "../rows/fit-rows.js";
import { cutOf } from "../search/cut.js";
import type { Lowest, Objective } from "../search/objective.js";
import { squaresObjective } from "../search/squares-objective.js";
import { normalEquations } from "../systems/normal-equations.js";
import { leastSquaresSearch } from "./least-squares-search.js";
import type { Search } from "./search.js";

/** Residuals beyond this many robust standard deviations lose weight: 95% as good as least squares for normal errors. */
const kink = 1.345;
/** Median absolute deviation of a standard normal value. */
const normalDeviation = 0.6744897501960817;
const rounds = 50;
const settled = 1e-9;

/** The density proportional to exp(-rho) has this integral; rho is z^2/2 up to the kink and straight beyond. */
const integral =
  Math.sqrt(2 * Math.PI) * (2 * normalCdf(kink) - 1) + (2 / kink) * Math.exp(-0.5 * kink * kink);

/** What the residuals of a robust fit come to. */
interface RobustScale {
  /** Standard deviation of the bulk of the residuals, in which "far off" is measured. */
  sigma: number;
  /** Variance that makes covariances and profile cuts cover, by Huber's formula. */
  variance: number;
}

/**
 * A group to be fitted so that values far off the rule count for less: 2 sigma^2 sum rho(residual/sigma) is made as low as
 * it can, rho being z^2/2 up to 1.345 and straight beyond. sigma is the median absolute residual, found together with
 * a first fit and then held.
 *
 * Covariance K^2 [sum psi^2/(n - p)] / [mean psi']^2 (J'J)^-1 with K = 1 + p/n (1 - m)/m, m = mean psi', so that the
 * weights are not taken for known.
 *
 * @see Huber and Ronchetti (2009), Robust Statistics, 2nd ed., equations (7.83) to (7.87) for the covariance, section 7.8
 *   for the search by weights, 4.5 for the constant 1.345.
 */
export function robustSearch(rule: Rule, group: ObservedGroup, options: FitOptions): Search {
  const plain = leastSquaresSearch(rule, group, options);
  const { rows, unknowns } = plain;
  const scale: RobustScale = { sigma: Number.NaN, variance: Number.NaN };
  const objective = robustObjective(plain, scale);
  let begun: readonly Float64Array[] | undefined;
  const settle = (from: Float64Array): Float64Array => {
    let at = plain.objective.minimise(from, unknowns.lower, unknowns.upper).estimates;
    for (let round = 0; round < rounds; round++) {
      const before = at;
      rows.reweigh?.(at);
      scale.sigma = scaleOfResiduals(rows, at);
      at = objective.minimise(at, unknowns.lower, unknowns.upper).estimates;
      if (alike(at, before)) break;
    }
    scale.variance = huberVariance(rows, at, scale.sigma);
    return at;
  };
  const starts = (): readonly Float64Array[] => {
    if (begun === undefined) {
      const found = plain.starts();
      begun = found.length === 0 ? found : [settle(found[0]!), ...found];
    }
    return begun;
  };
  const weightsAt = (at: Float64Array): Float64Array => {
    rows.prepare(at, false);
    return Float64Array.from({ length: rows.count }, (_, i) => weightOf(rows.residualAt(i), scale.sigma));
  };
  const { part: _, ...others } = plain;
  return {
    ...others,
    objective,
    starts,
    settle,
    cutAt: (value) => ({ ...cutOf(value, rows.count, rows.size, options), variance: scale.variance }),
    measures: (_at, value) => ({
      criteria: criteriaOf(logLikelihood(rows, value, scale.sigma), rows.count, rows.size + 1),
      sigma: undefined,
      exact: true,
    }),
    weightsAt,
    warnings: (at) => downweighted(group, rows, weightsAt(at)),
  };
}

function robustObjective({ rows, unknowns }: Search, scale: RobustScale): Objective {
  const roots = new Float64Array(rows.count).fill(1);
  const counted = weightedRows(rows, roots);
  const weighted = squaresObjective(normalEquations(counted), counted);
  const unweighted = squaresObjective(normalEquations(rows), rows);
  const weigh = (at: Float64Array): void => {
    rows.prepare(at, false);
    for (let i = 0; i < rows.count; i++) roots[i] = Math.sqrt(weightOf(rows.residualAt(i), scale.sigma));
  };
  const value = (at: Float64Array): number => {
    rows.prepare(at, false);
    let sum = 0;
    for (let i = 0; i < rows.count; i++) sum += 2 * rho(rows.residualAt(i) / scale.sigma);
    return Number.isFinite(sum) ? scale.sigma * scale.sigma * sum : Number.POSITIVE_INFINITY;
  };
  return {
    size: unknowns.names.length,
    value,
    minimise(start, lower, upper) {
      let found: Lowest | undefined;
      let evaluations = 0;
      for (let round = 0; round < rounds; round++) {
        const before: Float64Array = found?.estimates ?? start;
        weigh(before);
        found = weighted.minimise(before, lower, upper);
        evaluations += found.evaluations;
        if (alike(found.estimates, before)) break;
      }
      return { ...found!, value: value(found!.estimates), evaluations };
    },
    slope: weighted.slope,
    covariance(at) {
      weigh(at);
      const inside = roots.filter((root) => root === 1).length / rows.count;
      const found = unweighted.covariance(at);
      return { ...found, covariance: found.covariance.map((entry) => entry / inside) };
    },
  };
}

/** Rows whose residuals and slopes are multiplied by roots that change from round to round. */
function weightedRows(rows: FitRows, roots: Float64Array): FitRows {
  const row = new Float64Array(rows.size);
  return {
    ...rows,
    row,
    residualAt(i) {
      const residual = roots[i]! * rows.residualAt(i);
      for (let a = 0; a < row.length; a++) row[a] = roots[i]! * rows.row[a]!;
      return residual;
    },
  };
}

function rho(z: number): number {
  const size = Math.abs(z);
  return size <= kink ? 0.5 * z * z : kink * size - 0.5 * kink * kink;
}

function weightOf(residual: number, sigma: number): number {
  const size = Math.abs(residual);
  return size <= kink * sigma ? 1 : (kink * sigma) / size;
}

/** Median absolute residual over that of a standard normal value, widened for the unknowns that were fitted. */
function scaleOfResiduals(rows: FitRows, at: Float64Array): number {
  rows.prepare(at, false);
  const sizes = Float64Array.from({ length: rows.count }, (_, i) => Math.abs(rows.residualAt(i))).sort();
  const half = sizes.length >> 1;
  const median = sizes.length % 2 === 1 ? sizes[half]! : (sizes[half - 1]! + sizes[half]!) / 2;
  return (median / normalDeviation) * Math.sqrt(rows.count / (rows.count - rows.size));
}

function huberVariance(rows: FitRows, at: Float64Array, sigma: number): number {
  const { count, size } = rows;
  rows.prepare(at, false);
  let squares = 0;
  let inside = 0;
  for (let i = 0; i < count; i++) {
    const residual = Math.abs(rows.residualAt(i));
    squares += Math.min(residual, kink * sigma) ** 2;
    if (residual <= kink * sigma) inside++;
  }
  const share = inside / count;
  const correction = 1 + ((size / count) * (1 - share)) / share;
  return (correction ** 2 * squares) / (count - size) / share;
}

/** Of the density proportional to exp(-rho(residual/sigma)). */
function logLikelihood({ count, roots }: FitRows, value: number, sigma: number): number {
  const weights = roots.reduce((sum, root) => sum + Math.log(root), 0);
  return weights - value / (2 * sigma * sigma) - count * Math.log(sigma * integral);
}

function alike(a: Float64Array, b: Float64Array): boolean {
  return a.every((value, i) => Math.abs(value - b[i]!) <= settled * Math.abs(value));
}

/** Names the rows that a robust fit lets count for less than half. */
function downweighted(group: ObservedGroup, rows: FitRows, weights: Float64Array): Warning[] {
  const told = Array.from(weights, (weight, i) => ({ weight, row: group.rows[rows.entries[i]!]! }))
    .filter(({ weight }) => weight < 0.5)
    .map(({ weight, row }) => `row ${row} (weight ${weight.toFixed(2)})`);
  if (told.length === 0) return [];
  return [
    {
      code: "rows-count-less",
      message: `Outliers, down-weighted to less than half: ${told.join(", ")}. Look at what happened there.`,
    },
  ];
}
