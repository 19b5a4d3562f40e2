import type { Lowest, Objective } from "../search/objective.js";

/** What a profile starts from: the optimum, and where its cut lies. */
export interface ProfileProblem {
  readonly objective: Objective;
  readonly estimates: Float64Array;
  /** Lowest sum of squares, or twice the negative log-likelihood. */
  readonly value: number;
  readonly lower: Float64Array;
  readonly upper: Float64Array;
  /** What an increase is divided by: sigma^2 by the fit's convention; 1 for a likelihood. */
  readonly variance: number;
  /** [size, size]: where the other unknowns go when one is moved; NaN where not known. */
  readonly covariance: Float64Array;
  /** Other ends of searches, tried where a profile seems to leave its cut. */
  readonly others: readonly Float64Array[];
  /** Critical value of the increase. */
  readonly cut: number;
  /** The critical value that must be passed on both sides for the unknown to count as determined. */
  readonly firmCut: number;
}

/** Root of the increase minus root of the cut, and its slope. */
export interface Excess {
  readonly value: number;
  readonly excess: number;
  readonly slope: number;
}

export interface ProfileWalk {
  /** At a value of the unknown; an infinite excess where the rule breaks down. */
  readonly at: (value: number) => Excess;
  readonly restart: () => void;
  readonly trace: { value: number; increase: number }[];
  /** Points within the cut. */
  readonly inside: readonly Float64Array[];
  readonly better: () => Float64Array | undefined;
}

/** Refits with unknown i held, each time from the optimum at the value before. */
export function profileWalk(problem: ProfileProblem, i: number): ProfileWalk {
  const { objective, estimates, variance, cut } = problem;
  const lower = problem.lower.slice();
  const upper = problem.upper.slice();
  let from: Float64Array = estimates.slice();
  const trace: { value: number; increase: number }[] = [];
  const inside: Float64Array[] = [];
  let better: Float64Array | undefined;
  return {
    trace,
    inside,
    better: () => better,
    restart: () => {
      from = estimates.slice();
    },
    at(value) {
      lower[i] = value;
      upper[i] = value;
      let held = objective.minimise(shifted(problem, from, i, value), lower, upper);
      const limit = problem.value + cut * variance;
      // A search that got stuck would make the interval too narrow: outside the cut, other starts are tried as well.
      if (!(held.value <= limit)) held = lowestOf(held, problem, lower, upper, i, value);
      const slope = objective.slope(i);
      if (!Number.isFinite(held.value)) return { value, excess: Number.POSITIVE_INFINITY, slope: 0 };
      from = held.estimates;
      const rise = held.value - problem.value;
      if (rise < -1e-6 * variance) better = from.slice();
      const increase = Math.max(0, rise) / variance;
      trace.push({ value, increase });
      if (increase < cut) inside.push(from);
      const root = Math.sqrt(increase);
      return { value, excess: root - Math.sqrt(cut), slope: slope / (2 * variance * root) };
    },
  };
}

/** The lowest of a search and of those from other ends, the last one made being the one kept. */
function lowestOf(
  held: Lowest,
  problem: ProfileProblem,
  lower: Float64Array,
  upper: Float64Array,
  i: number,
  value: number,
): Lowest {
  let best = held;
  for (const other of problem.others) {
    const found = problem.objective.minimise(shifted(problem, other, i, value), lower, upper);
    if (found.value < best.value) best = found;
  }
  // The slope is that of the search made last.
  return problem.others.length === 0 ? best : problem.objective.minimise(best.estimates, lower, upper);
}

/** A point moved to a value of unknown i, the others going along as their covariance with it says where that is lower. */
function shifted(
  { covariance, objective }: ProfileProblem,
  from: Float64Array,
  i: number,
  value: number,
): Float64Array {
  const size = from.length;
  const spread = covariance[i * size + i]!;
  const move = value - from[i]!;
  const still = from.slice();
  still[i] = value;
  if (!(spread > 0)) return still;
  const moved = from.map((here, k) => here + (covariance[k * size + i]! / spread) * move);
  moved[i] = value;
  return objective.value(moved) < objective.value(still) ? moved : still;
}
