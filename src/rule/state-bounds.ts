import type { Rule } from "./rule.js";

/**
 * What happens when a state passes a bound. `absorbed`: it takes the value of the bound and keeps it, as a repaid debt
 * stays 0 and an extinct stock stays 0. `error`: the rule is not valid beyond the bound, and the path ends there. A value
 * that the rule puts exactly on the bound is not changed.
 */
export type BoundBehaviour = "absorbed" | "error";

/** Lowest and highest value of a state, and which of the two absorb it. */
export interface StateBound {
  readonly low: number;
  readonly high: number;
  readonly absorbsLow: boolean;
  readonly absorbsHigh: boolean;
}

/** Bounds of every state, in order; infinite if none are stated. A lower bound of 0 absorbs unless stated otherwise. */
export function stateBounds(rule: Rule): readonly StateBound[] {
  return rule.states.map((state) => {
    const [low, high] = rule.bounds[state] ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
    const stated = rule.atBounds[state];
    return {
      low,
      high,
      absorbsLow: Number.isFinite(low) && (stated === undefined ? low === 0 : stated === "absorbed"),
      absorbsHigh: Number.isFinite(high) && stated === "absorbed",
    };
  });
}

/** A value within its bounds: unchanged, the bound that absorbs it, or NaN where the path ends. */
export function withinBound({ low, high, absorbsLow, absorbsHigh }: StateBound, value: number): number {
  if (value >= low && value <= high && Number.isFinite(value)) return value;
  if (absorbsLow && value < low) return low;
  return absorbsHigh && value > high ? high : Number.NaN;
}
