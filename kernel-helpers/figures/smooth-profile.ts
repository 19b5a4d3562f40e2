import type { DrawnProfile } from "./profile-figure.js";

/** A line as places and heights. */
interface Curve {
  readonly x: readonly number[];
  readonly y: readonly number[];
}

const between = 12;

/**
 * A profile as a smooth line through the places where it was computed, as far as it matters.
 *
 * The signed root of the worsening is nearly a straight line in the parameter (Bates and Watts 1988, section 6.1), so
 * it is the root that is drawn straight between the places, and its square is the arc shown.
 *
 * @param highest - worsening beyond which nothing is drawn.
 */
export function smoothProfile(profile: DrawnProfile, highest: number): Curve {
  const reach = drawnReach(profile);
  const roots = Array.from(profile.held, (held, i) => ({ held, root: signedRoot(profile, i) })).filter(
    ({ held, root }) => Number.isFinite(root) && Math.abs(held - profile.estimate) <= reach,
  );
  const fine = roots.flatMap((place, i) => refined(place, roots[i + 1] ?? place));
  const drawn = fine.filter(({ root }) => root ** 2 <= highest);
  return { x: drawn.map(({ held }) => held), y: drawn.map(({ root }) => root ** 2) };
}

interface Place {
  readonly held: number;
  readonly root: number;
}

/** Places on the straight line from one place to the next, the next left out; the last place alone. */
function refined(from: Place, to: Place): Place[] {
  if (from === to) return [from];
  return Array.from({ length: between }, (_, part) => {
    const share = part / between;
    return {
      held: from.held + share * (to.held - from.held),
      root: from.root + share * (to.root - from.root),
    };
  });
}

function signedRoot({ held, worsening, estimate }: DrawnProfile, i: number): number {
  return Math.sign((held[i] as number) - estimate) * Math.sqrt(Math.max(0, worsening[i] as number));
}

/**
 * How far from the estimate a profile is drawn: on a side without a limit it was followed very far, which would
 * squeeze the rest into a corner.
 */
function drawnReach({ held, worsening, estimate, lower, upper }: DrawnProfile): number {
  if (lower !== undefined && upper !== undefined) return Number.POSITIVE_INFINITY;
  const limits = [lower, upper].filter((end) => end !== undefined).map((end) => Math.abs(end - estimate));
  if (limits.length > 0) return 4 * Math.max(...limits);
  const greatest = Array.from(worsening).reduce((most, each) => Math.max(most, each), 0);
  const half = Array.from(held).filter((_, i) => (worsening[i] as number) >= greatest / 2);
  return (
    4 * half.reduce((least, each) => Math.min(least, Math.abs(each - estimate)), Number.POSITIVE_INFINITY)
  );
}
