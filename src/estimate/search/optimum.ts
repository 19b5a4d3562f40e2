import type { StopReason, UnscaledCovariance } from "../../numeric/index.js";
import { allProfiles } from "../intervals/all-profiles.js";
import type { Profile } from "../intervals/profile-interval.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import type { Cut } from "./cut.js";
import { finiteOptimum } from "./finite-optimum.js";
import type { Lowest, Objective } from "./objective.js";
import { otherEnds, rivalOptima } from "./rival-optima.js";
import { including, type SearchBounds, searchBounds, searchFrom } from "./search-bounds.js";

/** The optimum of an objective, how well its unknowns are known, and others nearly as low. */
export interface Optimum {
  readonly at: Float64Array;
  /** Sum of squares, or twice the negative log-likelihood. */
  readonly value: number;
  readonly stop: StopReason;
  readonly cut: Cut;
  /** Absent where no intervals were asked for. */
  readonly profiles: readonly Profile[] | undefined;
  /** [unknowns, unknowns]; NaN where not determined. */
  readonly covariance: Float64Array;
  readonly determined: readonly boolean[];
  /** False where the values compared do not change along some direction that moves the unknown. */
  readonly separable: readonly boolean[];
  /** [unknowns]: 1 or -1 where the best value lies beyond any limit upwards or downwards, else 0. */
  readonly unbounded: Int8Array;
  /** Further optima within 2 log-likelihood units of this one. */
  readonly rivals: readonly Lowest[];
}

/** How many starting points are tried before the lowest optimum is taken. */
const tries = 5;
/** Times that the fit is done again because a profile found a lower optimum. */
const repeats = 4;
/** Times that an optimum is looked for again with the weights that follow from it. */
const settlings = 30;
/** Evaluations spent on profiles before nothing more is done about searches that get stuck: many times the usual. */
const mostEvaluations = 50_000;
/** How far beyond the optimum its profiles look for other unknowns that have none. */
const pastUnbounded = 100;

/** The lowest optimum from several starts, with its profiles; done again where a profile finds a lower one. */
export function optimum(
  objective: Objective,
  unknowns: Unknowns,
  starts: readonly Float64Array[],
  cutAt: (value: number) => Cut,
  withProfiles: boolean,
): Optimum {
  const tried = starts.slice(0, tries);
  const within = searchBounds(unknowns, tried);
  const varianceAt = (value: number): number => cutAt(value).variance;
  const search = (start: Float64Array): Lowest =>
    searchFrom(objective, start, unknowns, including(start, within, unknowns), varianceAt).lowest;
  let searches: readonly Lowest[] = tried.map(search);
  const effort = { left: mostEvaluations };
  for (let repeat = 0; ; repeat++) {
    searches = settled(objective, searches, search);
    const { unscaled, ...found } = lowestOf(objective, searches, unknowns, within, cutAt);
    const { at, value, cut } = found;
    const rivals = rivalOptima(objective, found, searches, unknowns, within, cut.variance);
    const base = { ...found, separable: unscaled.determined, rivals };
    if (!withProfiles) return { ...base, profiles: undefined, determined: unscaled.determined };
    const problem = {
      objective,
      estimates: at,
      value,
      lower: unknowns.lower,
      upper: unknowns.upper,
      within: profileBounds(found, within),
      unbounded: found.unbounded,
      covariance: found.covariance,
      others: otherEnds(at, searches),
      starts: tried,
      separable: unscaled.determined,
      effort,
      ...cut,
    };
    const isLast = repeat === repeats || effort.left < 0;
    const profiles = allProfiles(problem, isLast);
    const better = profiles.find((profile) => profile.better !== undefined)?.better;
    if (better === undefined || isLast) {
      const determined = unscaled.determined.map((known, i) => known && profiles[i]!.firm);
      return { ...base, profiles, determined };
    }
    searches = [search(better), ...searches];
  }
}

/** Searches done again until the weights that an objective takes from its optimum are those at the optimum found. */
function settled(
  objective: Objective,
  searches: readonly Lowest[],
  search: (start: Float64Array) => Lowest,
): readonly Lowest[] {
  let again = searches;
  for (let round = 0; round < settlings && objective.settle?.(lowestEnd(again).estimates) === true; round++)
    again = again.map(({ estimates }) => search(estimates));
  return again;
}

function lowestEnd(searches: readonly Lowest[]): Lowest {
  return searches.reduce((low, next) => (low.value <= next.value ? low : next));
}

type FoundOptimum = Pick<Optimum, "at" | "value" | "stop" | "cut" | "covariance" | "unbounded"> & {
  readonly unscaled: UnscaledCovariance;
};

/** The lowest end of searches at finite values, and what is known there. */
function lowestOf(
  objective: Objective,
  searches: readonly Lowest[],
  admitted: SearchBounds,
  within: SearchBounds,
  cutAt: (value: number) => Cut,
): FoundOptimum {
  const lowest = lowestEnd(searches);
  const known = (at: Lowest): Omit<FoundOptimum, "at" | "value" | "stop" | "unbounded"> => {
    const cut = cutAt(at.value);
    const unscaled = objective.covariance(at.estimates);
    return { cut, unscaled, covariance: unscaled.covariance.map((entry) => entry * cut.variance) };
  };
  const there = known(lowest);
  const size = lowest.estimates.length;
  const errors = lowest.estimates.map((_, i) => Math.sqrt(there.covariance[i * (size + 1)]!));
  const { best, unbounded } = finiteOptimum(objective, lowest, admitted, within, errors, there.cut.variance);
  const { estimates: at, value, stop } = best;
  return { at, value, stop, unbounded, ...(best === lowest ? there : known(best)) };
}

/** Where the profiles look for the other unknowns: not far beyond the values taken of those that run off. */
function profileBounds(
  { at, unbounded }: Pick<Optimum, "at" | "unbounded">,
  { lower, upper }: SearchBounds,
): SearchBounds {
  const cap = (i: number, direction: 1 | -1): number =>
    unbounded[i] === direction && at[i]! * direction > 0 ? pastUnbounded * at[i]! : direction * Infinity;
  return {
    lower: lower.map((low, i) => Math.max(low, cap(i, -1))),
    upper: upper.map((high, i) => Math.min(high, cap(i, 1))),
  };
}
