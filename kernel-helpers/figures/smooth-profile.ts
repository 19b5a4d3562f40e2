import type { ProfileCurve } from "./profile-figure.js";

/** A line as x and y values. */
interface Curve {
  readonly x: readonly number[];
  readonly y: readonly number[];
}

const pointsBetween = 12;

/**
 * A profile as a smooth line through its computed points, as far as it is drawn.
 *
 * The signed root of the increase is nearly linear in the parameter (Bates and Watts 1988, section 6.1), so the root is
 * interpolated linearly and its square is drawn.
 *
 * @param maxIncrease - increase beyond which nothing is drawn.
 */
export function smoothProfile(profile: ProfileCurve, maxIncrease: number): Curve {
  const reach = drawnReach(profile);
  const roots = Array.from(profile.values, (held, i) => ({ held, root: signedRoot(profile, i) })).filter(
    ({ held, root }) => Number.isFinite(root) && Math.abs(held - profile.estimate) <= reach,
  );
  const fine = roots.flatMap((place, i) => refined(place, roots[i + 1] ?? place));
  const drawn = fine.filter(({ root }) => root ** 2 <= maxIncrease);
  return { x: drawn.map(({ held }) => held), y: drawn.map(({ root }) => root ** 2) };
}

interface Place {
  readonly held: number;
  readonly root: number;
}

/** Points from one computed point up to the next, which is excluded; the last point alone. */
function refined(from: Place, to: Place): Place[] {
  if (from === to) return [from];
  return Array.from({ length: pointsBetween }, (_, part) => {
    const share = part / pointsBetween;
    return {
      held: from.held + share * (to.held - from.held),
      root: from.root + share * (to.root - from.root),
    };
  });
}

function signedRoot({ values, increase, estimate }: ProfileCurve, i: number): number {
  return Math.sign((values[i] as number) - estimate) * Math.sqrt(Math.max(0, increase[i] as number));
}

/**
 * Distance from the estimate up to which a profile is drawn: on a side without a limit it is computed very far out, which
 * would compress the rest.
 */
function drawnReach({ values, increase, estimate, lower, upper }: ProfileCurve): number {
  if (lower !== undefined && upper !== undefined) return Number.POSITIVE_INFINITY;
  const limits = [lower, upper].filter((end) => end !== undefined).map((end) => Math.abs(end - estimate));
  if (limits.length > 0) return 4 * Math.max(...limits);
  const greatest = Array.from(increase).reduce((most, each) => Math.max(most, each), 0);
  const half = Array.from(values).filter((_, i) => (increase[i] as number) >= greatest / 2);
  return (
    4 * half.reduce((least, each) => Math.min(least, Math.abs(each - estimate)), Number.POSITIVE_INFINITY)
  );
}
