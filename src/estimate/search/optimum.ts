import type { StopReason } from "../../numeric/index.js";
import { type Profile, profileInterval } from "../intervals/profile-interval.js";
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
  const others = distinct(searches).filter((other) => !alike(other, at));
  const problem = { objective, estimates: at, value: best.value, lower, upper, covariance, others, ...cut };
  const profiles = unknowns.names.map((_, i) => {
    const error = Math.sqrt(covariance[i * objective.size + i]!);
    const usable = unscaled.determined[i] && error > 0 && Number.isFinite(error);
    return profileInterval(problem, i, usable ? error * Math.sqrt(cut.cut) : 0.1 * Math.abs(at[i]!) || 1);
  });
  const better = profiles.find((profile) => profile.better !== undefined)?.better;
  if (better !== undefined && starts[0] !== better)
    return optimum(objective, unknowns, [better], cutAt, withProfiles);
  return { ...base, profiles, determined: unscaled.determined.map((known, i) => known && profiles[i]!.firm) };
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

/** Ends with the same value are one optimum: the fitted values agree, along an edge at infinity the constants may not. */
function sameEnd(a: Lowest, b: Lowest, within: number): boolean {
  return Math.abs(a.value - b.value) <= 1e-6 * within || alike(a.estimates, b.estimates);
}

function alike(a: Float64Array, b: Float64Array): boolean {
  return a.every((value, i) => Math.abs(value - b[i]!) <= same * Math.max(Math.abs(value), Math.abs(b[i]!)));
}
