import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { criteriaOf } from "../result/criteria.js";
import { type Overdispersion, overdispersionOf } from "../result/overdispersion.js";
import type { FitRows } from "../rows/fit-rows.js";
import { likelihoodCut, normalLikelihoodCut } from "../search/cut.js";
import { likelihoodObjective } from "../search/likelihood-objective.js";
import type { Objective } from "../search/objective.js";
import { startingPoints } from "../search/starting-points.js";
import { trialPoints } from "../search/trial-values.js";
import { prepared } from "../systems/prepared.js";
import { place, type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import { checkedObjective } from "./checked-objective.js";
import { recordMaker } from "./draw-record.js";
import { type ErrorFamily, errorFamily } from "./error-family.js";
import { scaleOf } from "./scale.js";
import type { Search } from "./search.js";

/** A group of counts, or with censored values, to be fitted by maximum likelihood. */
export function likelihoodSearch(rule: Rule, group: ObservedGroup, options: FitOptions): Search {
  const family = errorFamily(options);
  const plain = unknownsOf(rule, options);
  const unknowns = unknownsOf(rule, options, family.spreads);
  const { rows } = prepared(rule, group, unknowns, options);
  const normal = family.spreads[0] === "sigma";
  const spreadAt = (at: Float64Array): number => spreadOf(at, unknowns);
  const minusTwice = minusTwiceLogLikelihood(rule, group, rows, unknowns, family);
  const over = (from: number, end: number): Objective =>
    likelihoodObjective((at) => minusTwice(at, from, end), unknowns, rows.reweigh);
  const unchecked = over(0, rows.count);
  const objective = checkedObjective(unchecked);
  const weighted = family.counts && rows.roots.some((root) => root !== 1);
  const censoring = censoringOf(rule, group, rows);
  const drawable = !weighted && censoring.every((mark) => mark === 0);
  const make = recordMaker(rule, group, rows);
  return {
    kind: "likelihood",
    group,
    scale: scaleOf(options),
    unknowns,
    rows,
    objective,
    part: (from, end) => checkedObjective(over(from, end)),
    starts() {
      const squares = prepared(rule, group, plain, options);
      const points = [
        ...startingPoints(rule, group, options, plain, squares),
        ...trialPoints(rule, group, options, plain, trials),
      ];
      const lifted = family.counts ? points.flatMap((at) => liftedStarts(at, plain)) : points;
      const begun = likeliest(
        lifted.map((at) => withSpread(at, rows, unknowns, family)),
        objective.value,
      );
      const { lower, upper } = unknowns;
      return begun
        .map((at) => unchecked.minimise(at, lower, upper))
        .sort((a, b) => a.value - b.value)
        .map(({ estimates }) => estimates);
    },
    cutAt: () =>
      normal ? normalLikelihoodCut(rows.count, plain.names.length, options) : likelihoodCut(options),
    measures: (at, value) => ({
      criteria: criteriaOf(-0.5 * value, rows.count, unknowns.names.length),
      sigma: normal ? spreadAt(at) : undefined,
      exact: false,
      ...(options.distribution === "poisson" && poissonScatter(rows, censoring, at)),
    }),
    family,
    spreadAt,
    ...(drawable && {
      draw: (at, _, stream) =>
        make(at, (fitted, i) => family.draw(fitted, rows.roots[i]!, spreadAt(at), stream)),
    }),
  };
}

/** Trial points that are looked at beside the ends of least-squares searches, and starts that are tried of all. */
const trials = 150;
const kept = 10;

/** A count has no likelihood on a trajectory of 0: a start there is begun at half a count, and at one. */
function liftedStarts(at: Float64Array, { roles }: Unknowns): readonly Float64Array[] {
  const low = at.some((value, i) => roles[i] === "initial" && value < 0.5);
  if (!low) return [at];
  return [0.5, 1].map((least) =>
    at.map((value, i) => (roles[i] === "initial" ? Math.max(value, least) : value)),
  );
}

/**
 * The best of several starts at which the likelihood exists, and of every size of the first unknown the best: counts that
 * say little have several optima, which lie apart in it.
 */
function likeliest(
  starts: readonly Float64Array[],
  value: (at: Float64Array) => number,
): readonly Float64Array[] {
  const sorted = starts
    .map((at) => ({ at, value: value(at) }))
    .filter((each) => Number.isFinite(each.value))
    .sort((a, b) => a.value - b.value)
    .map(({ at }) => at);
  return sorted
    .filter((at, i) => sorted.findIndex((other) => isNear(other[0]!, at[0]!)) === i)
    .slice(0, kept);
}

/** Whether two values differ by less than a quarter. */
function isNear(one: number, other: number): boolean {
  return Math.abs(one - other) < 0.25 * Math.max(Math.abs(one), Math.abs(other), Number.MIN_VALUE);
}

function minusTwiceLogLikelihood(
  rule: Rule,
  group: ObservedGroup,
  rows: FitRows,
  unknowns: Unknowns,
  family: ErrorFamily,
): (at: Float64Array, from: number, end: number) => number {
  const censoring = censoringOf(rule, group, rows);
  const value = { observed: 0, fitted: 0, censoring: 0, root: 1 };
  return (at, from, end) => {
    place(unknowns, at);
    rows.prepare(at, false);
    const spread = spreadOf(at, unknowns);
    let sum = 0;
    for (let i = from; i < end; i++) {
      rows.residualAt(i);
      value.observed = rows.observed[i]!;
      value.fitted = rows.fitted();
      value.censoring = censoring[i]!;
      value.root = rows.roots[i]!;
      sum += family.logLikelihood(value, spread);
    }
    return Number.isFinite(sum) ? -2 * sum : Number.POSITIVE_INFINITY;
  };
}

/** How far exact counts lie from their means, in standard deviations of a Poisson count. */
function poissonScatter(
  rows: FitRows,
  censoring: Int8Array,
  at: Float64Array,
): { readonly overdispersion?: Overdispersion } {
  rows.prepare(at, false);
  const means = new Float64Array(rows.count);
  const pearson = means.map((_, i) => {
    rows.residualAt(i);
    means[i] = rows.fitted();
    const residual = (rows.roots[i]! * (rows.observed[i]! - means[i]!)) / Math.sqrt(means[i]!);
    return censoring[i] === 0 ? residual : Number.NaN;
  });
  const overdispersion = overdispersionOf(pearson, means, rows.size);
  return overdispersion === undefined ? {} : { overdispersion };
}

/** [count]: 0 exact, -1 at or below the value, 1 at or above it. */
export function censoringOf(rule: Rule, group: ObservedGroup, rows: FitRows): Int8Array {
  return Int8Array.from(
    rows.entries,
    (entry, i) => group.censoring?.[rule.states[rows.states[i]!]!]?.[entry] ?? 0,
  );
}

/** The spread among the unknowns: a standard deviation, or a dispersion; 1 where there is none. */
function spreadOf(at: Float64Array, { roles, rooted }: Unknowns): number {
  const place = roles.indexOf("scale");
  if (place < 0) return 1;
  // A dispersion of 0 is the Poisson distribution, which the formulas reach only in the limit.
  return rooted[place] ? Math.sqrt(at[place]!) : Math.max(at[place]!, 1e-9);
}

/** A start with its spread put where the residuals say: their root mean square, or the excess over a Poisson's. */
function withSpread(
  start: Float64Array,
  rows: FitRows,
  unknowns: Unknowns,
  { counts }: ErrorFamily,
): Float64Array {
  const whole = new Float64Array(unknowns.names.length);
  whole.set(start);
  rows.prepare(whole, false);
  let squares = 0;
  let excess = 0;
  let means = 0;
  for (let i = 0; i < rows.count; i++) {
    squares += rows.residualAt(i) ** 2;
    excess += (rows.observed[i]! - rows.fitted()) ** 2 - rows.fitted();
    means += rows.fitted() ** 2;
  }
  const spread = counts ? Math.max(excess / means, 0.01) : squares / rows.count;
  unknowns.roles.forEach((role, i) => {
    if (role === "scale") whole[i] = spread;
  });
  return whole;
}
