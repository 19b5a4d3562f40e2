import { studentQuantile } from "../../numeric/index.js";

/** Times of several units taken together: each unit's own answer is one value. */
export interface AcrossUnits {
  /** Units of the record. */
  readonly count: number;
  readonly mean: number;
  /** Between units, divided by count - 1. */
  readonly standardDeviation: number;
  /** For the mean over units: mean +- t(count - 1) sd / sqrt(count). */
  readonly meanLower: number;
  readonly meanUpper: number;
  /** For a new unit: mean +- t(count - 1) sd sqrt(1 + 1/count). */
  readonly newLower: number;
  readonly newUpper: number;
}

/**
 * A unit is one value, however often it was read: readings of one unit are not independent of each other.
 *
 * @returns undefined for a single unit, several scenarios, or a unit that does not get there.
 * @see Pinheiro and Bates (2000), Mixed-Effects Models in S and S-PLUS, section 4.1, for unit-level fits taken together
 *   (from memory).
 */
export function acrossUnits(
  groups: readonly { readonly time: number | undefined; readonly scenario: string }[],
  level: number,
): AcrossUnits | undefined {
  const times = groups.flatMap((group) => group.time ?? []);
  const count = groups.length;
  if (count < 2 || times.length < count || groups.some((group) => group.scenario !== "")) return undefined;
  const mean = times.reduce((sum, time) => sum + time, 0) / count;
  const squares = times.reduce((sum, time) => sum + (time - mean) ** 2, 0);
  const standardDeviation = Math.sqrt(squares / (count - 1));
  const reach = studentQuantile((1 + level) / 2, count - 1) * standardDeviation;
  const half = reach / Math.sqrt(count);
  const wide = reach * Math.sqrt(1 + 1 / count);
  return {
    count,
    mean,
    standardDeviation,
    meanLower: mean - half,
    meanUpper: mean + half,
    newLower: mean - wide,
    newUpper: mean + wide,
  };
}
