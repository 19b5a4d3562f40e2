import type { Objective } from "../search/objective.js";
import { holding, type SearchBounds, type SearchEnd, searchFrom } from "../search/search-bounds.js";
import { continuations } from "./continuations.js";

/** What a profile starts from: the optimum, and where its cut lies. */
export interface ProfileProblem {
  readonly objective: Objective;
  readonly estimates: Float64Array;
  /** Lowest sum of squares, or twice the negative log-likelihood. */
  readonly value: number;
  /** Admitted values. */
  readonly lower: Float64Array;
  readonly upper: Float64Array;
  /** [unknowns]: 1 or -1 where the best value lies beyond any limit upwards or downwards, else 0. */
  readonly unbounded: Int8Array;
  /** Where the unknowns that are not held are looked for. */
  readonly within: SearchBounds;
  /** What an increase is divided by: sigma^2 by the fit's convention; 1 for a likelihood. */
  readonly variance: number;
  /** [size, size]: where the other unknowns go when one is moved; NaN where not known. */
  readonly covariance: Float64Array;
  /** Other ends of searches, tried where a profile seems to leave its cut. */
  readonly others: readonly Float64Array[];
  /** Where the searches for the optimum began, tried at a limit. */
  readonly starts: readonly Float64Array[];
  /** False for an unknown that moves along some direction without effect on the record at the optimum. */
  readonly separable: readonly boolean[];
  /** Evaluations that may still be spent on looking for lower points where a search seems to have got stuck. */
  readonly effort: { left: number };
  /** Critical value of the increase. */
  readonly cut: number;
  /** The critical value that must be passed on both sides for the unknown to count as determined. */
  readonly firmCut: number;
}

/** The lowest point found with the unknown held at a value. */
export interface ProfilePoint {
  readonly value: number;
  readonly estimates: Float64Array;
  /** Over the optimum, in units of the variance; infinite where the rule breaks down. */
  readonly increase: number;
  /** Root of the increase minus root of the cut, and its slope. */
  readonly excess: number;
  readonly slope: number;
  /** Whether another unknown was stopped short of a lower point. */
  readonly isHeldBack: boolean;
}

export interface ProfileWalk {
  /** Finite points by increasing value, the lowest met at each; the optimum is one. */
  readonly points: readonly ProfilePoint[];
  /** @param everyStart - searches from all points that offer themselves, not only from the most promising. */
  readonly at: (value: number, everyStart?: boolean) => ProfilePoint;
  /** A point lower than the optimum by more than rounding, if one was met. */
  readonly better: () => Float64Array | undefined;
}

/** A fall below the optimum that counts, in units of the variance. */
const fall = 1e-4;

/**
 * Refits with unknown i held, each continued from the points already met beside it.
 *
 * @param seeds - points met elsewhere to continue from as well.
 */
export function profileWalk(
  problem: ProfileProblem,
  i: number,
  seeds: readonly Float64Array[] = [],
): ProfileWalk {
  const { variance, cut, estimates } = problem;
  const root = Math.sqrt(cut);
  const points: ProfilePoint[] = [
    { value: estimates[i]!, estimates, increase: 0, excess: -root, slope: 0, isHeldBack: false },
  ];
  let better: Float64Array | undefined;
  const visited = (value: number, { lowest, slope, isHeldBack }: HeldLowest): ProfilePoint => {
    const rise = lowest.value - problem.value;
    const at = lowest.estimates;
    if (!Number.isFinite(rise))
      return { value, estimates: at, increase: Infinity, excess: Infinity, slope: 0, isHeldBack };
    if (rise < -fall * variance) better = at;
    // Of a record without scatter any rise is infinite, and none is none.
    const increase = rise > 0 ? rise / variance : 0;
    const height = Math.sqrt(increase);
    const point = {
      value,
      estimates: at,
      increase,
      excess: height - root,
      slope: slope / (2 * variance * height),
      isHeldBack,
    };
    return keep(points, point);
  };
  const at = (value: number, everyStart = false): ProfilePoint =>
    visited(value, continued(problem, points, i, value, everyStart));
  for (const seed of seeds) visited(seed[i]!, lowestHeld(problem, [seed], i, seed[i]!));
  return { points, at, better: () => better };
}

/** Puts a point in its place; of two with the same value the lower is kept, and returned. */
function keep(points: ProfilePoint[], point: ProfilePoint): ProfilePoint {
  const next = points.findIndex(({ value }) => value >= point.value);
  const place = next < 0 ? points.length : next;
  const same = points[place]?.value === point.value ? points[place] : undefined;
  if (same !== undefined && same.increase <= point.increase) return same;
  points.splice(place, same === undefined ? 0 : 1, point);
  return point;
}

/** Where a search with one unknown held ended. */
export interface HeldLowest extends SearchEnd {
  /** Of the objective by the unknown held. */
  readonly slope: number;
}

function continued(
  problem: ProfileProblem,
  points: readonly ProfilePoint[],
  i: number,
  value: number,
  everyStart: boolean,
): HeldLowest {
  const near = continuations(problem, points, i, value);
  const first = lowestHeld(problem, near.slice(0, 1), i, value);
  const { value: height, stop } = first.lowest;
  const within = height <= problem.value + problem.cut * problem.variance;
  const settled = stop.kind === "converged" && stop.test === "gradient";
  if ((within && settled && !everyStart) || problem.effort.left < 0) return first;
  // A search that got stuck would make the interval too narrow: outside the cut, other starts are tried as well.
  const further = everyStart || !settled ? [...near.slice(1), ...problem.others] : problem.others;
  if (further.length === 0) return first;
  return lowestHeld(problem, [first.lowest.estimates, ...further], i, value);
}

const nowhere: SearchEnd = {
  lowest: {
    estimates: new Float64Array(0),
    value: Number.POSITIVE_INFINITY,
    stop: { kind: "failed", reason: "no point from which to search" },
    evaluations: 0,
  },
  isHeldBack: false,
};

/** The lowest end of searches from several points, with unknown i held. */
export function lowestHeld(
  problem: ProfileProblem,
  starts: readonly Float64Array[],
  i: number,
  value: number,
): HeldLowest {
  const { objective, variance } = problem;
  const admitted = holding(problem, i, value);
  const near = holding(problem.within, i, value);
  const enough = Number.isFinite(problem.cut) ? problem.value + problem.cut * variance : undefined;
  const search = (from: Float64Array): SearchEnd =>
    searchFrom(objective, from, admitted, near, () => variance, enough);
  let best = nowhere;
  let last = nowhere;
  for (const start of starts) {
    if (start.length === 0) continue;
    const from = start.slice();
    from[i] = value;
    last = search(from);
    problem.effort.left -= last.lowest.evaluations;
    if (last.lowest.value < best.lowest.value) best = last;
  }
  // The slope is that where the last search ended.
  if (last !== best) best = search(best.lowest.estimates);
  return { ...best, slope: Number.isFinite(best.lowest.value) ? objective.slope(i) : 0 };
}
