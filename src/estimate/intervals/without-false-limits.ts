import type { Profile } from "./profile-interval.js";

/** Share of a limit's distance from the estimate by which a point must lie beyond it: less is rounding. */
const beyond = 0.01;

/**
 * Profiles without the limits that a point contradicts: each point met on the way that explains the record within the
 * cut must lie inside every interval, since a profile's interval is the shadow of all such points. A limit beyond which
 * one lies was met by a search that got stuck, as happens where parameters run away along a ridge.
 *
 * @param inside - points within the cut, from every profile and search.
 */
export function withoutFalseLimits(
  profiles: readonly Profile[],
  estimates: Float64Array,
  inside: readonly Float64Array[],
): readonly Profile[] {
  return profiles.map((profile, i) => {
    const open = profile.lower === undefined || profile.upper === undefined;
    const passed = (limit: number | undefined, direction: 1 | -1): boolean => {
      if (limit === undefined) return false;
      const slack = beyond * Math.abs(limit - estimates[i]!);
      // Where the other side is open, a value of the other sign was reached through infinity, not past the limit.
      const reached = inside.filter((point) => !(open && point[i]! * estimates[i]! < 0));
      return reached.some((point) => (point[i]! - limit) * direction > slack);
    };
    const lower = passed(profile.lower, -1);
    const upper = passed(profile.upper, 1);
    if (!(lower || upper)) return profile;
    const side = lower && upper ? "lower or upper" : lower ? "lower" : "upper";
    return {
      ...profile,
      ...(lower && { lower: undefined }),
      ...(upper && { upper: undefined }),
      firm: false,
      note: `no ${side} limit: values beyond explain the record as well where other parameters go along`,
    };
  });
}
