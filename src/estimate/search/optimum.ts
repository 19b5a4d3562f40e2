import type { StopReason } from "../../numeric/index.js";
import { type Profile, profileInterval } from "../intervals/profile-interval.js";
import type { ProfileProblem } from "../intervals/profile-walk.js";
import { withoutFalseLimits } from "../intervals/without-false-limits.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import type { Cut } from "./cut.js";
import type { Lowest, Objective } from "./objective.js";

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
  /** Further optima within 2 log-likelihood units of this one. */
  readonly rivals: readonly Lowest[];
}

/** How many starting points are tried before the lowest optimum is taken. */
const tries = 5;
/** Rivals closer than this, relative, are the same optimum. */
const same = 1e-4;
/** Times beyond a start at which an unknown has run off. */
const runaway = 1e6;

/** The lowest optimum from several starts, with its profiles; done again where a profile finds a lower one. */
export function optimum(
  objective: Objective,
  unknowns: Unknowns,
  starts: readonly Float64Array[],
  cutAt: (value: number) => Cut,
  withProfiles: boolean,
): Optimum {
  const { lower, upper } = unknowns;
  const searches = starts.slice(0, tries).map((start) => objective.minimise(start, lower, upper));
  const best = searches.reduce((low, next) => (next.value < low.value ? next : low));
  const at = best.estimates;
  const cut = cutAt(best.value);
  const unscaled = objective.covariance(at);
  const covariance = unscaled.covariance.map((value) => value * cut.variance);
  const rivals = rivalsOf(best, searches, 4 * cut.variance);
  const base = {
    at,
    value: best.value,
    stop: best.stop,
    cut,
    covariance,
    separable: unscaled.determined,
    rivals,
  };
  if (!withProfiles) return { ...base, profiles: undefined, determined: unscaled.determined };
  const ends = distinct(searches).filter((other) => !alike(other, at));
  // From where a parameter has run off no search comes back: the profile must be tried from before that as well.
  const others = hasRunOff(at, starts) ? [...ends, ...starts.slice(0, tries)] : ends;
  const problem = { objective, estimates: at, value: best.value, lower, upper, covariance, others, ...cut };
  const profiles = unknowns.names.map((_, i) => profileOf(problem, i, unscaled.determined[i]!));
  const better = profiles.find((profile) => profile.better !== undefined)?.better;
  if (better !== undefined && starts[0] !== better)
    return optimum(objective, unknowns, [better, ...starts], cutAt, withProfiles);
  const near = searches.filter(({ value }) => value - best.value < cut.cut * cut.variance);
  const ownEnds = near.map(({ estimates }) => estimates);
  const kept = corrected(problem, profiles, ownEnds, unscaled.determined);
  const determined = unscaled.determined.map((known, i) => known && kept[i]!.firm);
  return { ...base, profiles: kept, determined };
}

function profileOf(problem: ProfileProblem, i: number, known: boolean): Profile {
  const { covariance, estimates, cut } = problem;
  const error = Math.sqrt(covariance[i * estimates.length + i]!);
  const usable = known && error > 0 && Number.isFinite(error);
  const spacing = usable ? error * Math.sqrt(cut) : 0.1 * Math.abs(estimates[i]!) || 1;
  return profileInterval(problem, i, spacing);
}

/** Profiles whose limits a point contradicts done again from that point; a limit still contradicted is dropped. */
function corrected(
  problem: ProfileProblem,
  profiles: readonly Profile[],
  ends: readonly Float64Array[],
  known: readonly boolean[],
): readonly Profile[] {
  const inside = [...ends, ...profiles.flatMap((profile) => profile.inside)];
  const again = withoutFalseLimits(profiles, problem.estimates, inside).map((profile, i) => {
    if (profile === profiles[i]) return profile;
    return profileOf({ ...problem, others: [...problem.others, ...outermost(inside, i)] }, i, known[i]!);
  });
  const all = [...inside, ...again.flatMap((profile) => profile.inside)];
  return withoutFalseLimits(again, problem.estimates, all);
}

/** Whether some unknown lies this many times beyond where it was looked for. */
function hasRunOff(at: Float64Array, starts: readonly Float64Array[]): boolean {
  const farther = (value: number, start: number): boolean =>
    Math.abs(value) > runaway * Math.max(1, Math.abs(start));
  return at.some((value, i) => starts.some((start) => farther(value, start[i]!)));
}

/** The points at which unknown i is lowest and highest. */
function outermost(points: readonly Float64Array[], i: number): readonly Float64Array[] {
  const sorted = [...points].sort((a, b) => a[i]! - b[i]!);
  return [sorted[0]!, sorted[sorted.length - 1]!];
}

/** The ends of searches, each once. */
function distinct(searches: readonly Lowest[]): readonly Float64Array[] {
  const found: Float64Array[] = [];
  for (const { estimates } of searches)
    if (!found.some((other) => alike(other, estimates))) found.push(estimates);
  return found;
}

function rivalsOf(best: Lowest, searches: readonly Lowest[], within: number): readonly Lowest[] {
  const found: Lowest[] = [];
  for (const search of searches) {
    const near = search.value - best.value <= within && search.stop.kind === "converged";
    const known = [best, ...found].some((other) => sameEnd(other, search, within));
    if (near && !known) found.push(search);
  }
  return found;
}

/** Ends with the same value are one optimum: the fitted values agree, along an edge at infinity the parameters may not. */
function sameEnd(a: Lowest, b: Lowest, within: number): boolean {
  return Math.abs(a.value - b.value) <= 1e-6 * within || alike(a.estimates, b.estimates);
}

function alike(a: Float64Array, b: Float64Array): boolean {
  return a.every((value, i) => Math.abs(value - b[i]!) <= same * Math.max(Math.abs(value), Math.abs(b[i]!)));
}
