import { type Profile, profileInterval } from "./profile-interval.js";
import { lowestHeld, type ProfileProblem } from "./profile-walk.js";

/** Share of a limit's distance from the estimate by which a point must lie beyond it: less is rounding. */
const beyond = 1e-4;
/** How far below the cut a point at a limit must lie, as a share of the cut. */
const below = 1e-3;
const rounds = 3;

/**
 * The profiles of all unknowns, held against one another: a point met on the way of one that explains the record within
 * the cut must lie inside the intervals of all, since a profile's interval is the shadow of all such points. At every
 * limit the fit is done once more from the starts and from the ends of the other profiles. Where a point lies beyond a
 * limit, or a search at it comes out lower, the profile is followed on from there.
 *
 * @param isLast - whether to go on where a profile has found a better optimum, after which the others are of no use.
 */
export function allProfiles(problem: ProfileProblem, isLast: boolean): readonly Profile[] {
  const spacings = problem.separable.map((_, i) => spacingOf(problem, i));
  const profiles: Profile[] = [];
  const found = (): boolean => !isLast && profiles.some(({ better }) => better !== undefined);
  for (let i = 0; i < spacings.length && !found(); i++)
    profiles.push(profileInterval(problem, i, spacings[i]!));
  for (let round = 0; round < rounds && !found() && problem.effort.left > 0; round++) {
    const inside = [...within(problem), ...profiles.flatMap((profile) => profile.inside)];
    const ends = profiles.flatMap((_, i) => outermost(inside, i));
    const seeds = profiles.map((profile, i) => [
      ...pointsBeyond(profile, i, problem.estimates[i]!, inside),
      ...lowerAtLimits(problem, profile, i, ends),
    ]);
    if (seeds.every(({ length }) => length === 0)) break;
    seeds.forEach((points, i) => {
      if (points.length > 0) profiles[i] = profileInterval(problem, i, spacings[i]!, points);
    });
  }
  return profiles;
}

/** Points at the limits of an unknown that explain the record better than the limits say. */
function lowerAtLimits(
  problem: ProfileProblem,
  { lower, upper }: Profile,
  i: number,
  ends: readonly Float64Array[],
): readonly Float64Array[] {
  const highest = problem.value + (1 - below) * problem.cut * problem.variance;
  return [lower, upper].flatMap((limit) => {
    if (limit === undefined) return [];
    const { lowest } = lowestHeld(problem, [...problem.starts, ...ends], i, limit);
    return lowest.value < highest ? [lowest.estimates] : [];
  });
}

/** The points at which unknown i is lowest and highest. */
function outermost(points: readonly Float64Array[], i: number): readonly Float64Array[] {
  const sorted = [...points].sort((a, b) => a[i]! - b[i]!);
  return sorted.length === 0 ? [] : [sorted[0]!, sorted[sorted.length - 1]!];
}

/** The ends of other searches that explain the record within the cut. */
function within({ objective, others, value, cut, variance }: ProfileProblem): readonly Float64Array[] {
  return others.filter((other) => objective.value(other) - value < cut * variance);
}

/** A first distance from the estimate: where a parabola meets the cut, but no farther than half the unknown's own size. */
function spacingOf({ covariance, estimates, cut, starts, separable }: ProfileProblem, i: number): number {
  const sizes = starts.map((start) => Math.abs(start[i]!)).sort((a, b) => a - b);
  const own = Math.max(Math.abs(estimates[i]!), sizes[sizes.length >> 1]!) || 1;
  const reach = Math.sqrt(covariance[i * estimates.length + i]! * cut);
  return separable[i] && reach > 0 ? Math.min(reach, own / 2) : own / 10;
}

/** The points that lie farthest beyond the limits of an unknown, at most one on a side. */
function pointsBeyond(
  { lower, upper }: Profile,
  i: number,
  estimate: number,
  inside: readonly Float64Array[],
): readonly Float64Array[] {
  const open = lower === undefined || upper === undefined;
  // Where the other side is open, a value of the other sign was reached through infinity, not past the limit.
  const [lowest, highest] = outermost(
    inside.filter((point) => !(open && point[i]! * estimate < 0)),
    i,
  );
  const passed = (limit: number | undefined, value: number, direction: 1 | -1): boolean =>
    limit !== undefined && (value - limit) * direction > beyond * Math.abs(limit - estimate);
  return [
    ...(lowest !== undefined && passed(lower, lowest[i]!, -1) ? [lowest] : []),
    ...(highest !== undefined && passed(upper, highest[i]!, 1) ? [highest] : []),
  ];
}
