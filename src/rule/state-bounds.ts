import type { Rule } from "./rule.js";

/**
 * What becomes of a state at its bounds. `absorbed`: a value beyond the bound becomes the bound and stays there for good,
 * as a cleared debt stays 0 and a collapsed stock is gone. `error`: the rule means nothing beyond them, so the path
 * ends there. A value that the rule itself puts on the bound is left to the rule.
 */
export type AtBound = "absorbed" | "error";

/** Lowest and highest value of a state, and whether a path that gets there stays there. */
export interface StateBound {
  readonly low: number;
  readonly high: number;
  readonly absorbsLow: boolean;
  readonly absorbsHigh: boolean;
}

/** The bounds of every state in order; open where none are stated. A lower bound of 0 absorbs unless stated otherwise. */
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

/** A value as it stands within its bounds: itself, the bound that absorbs it, or NaN where the path ends. */
export function withinBound({ low, high, absorbsLow, absorbsHigh }: StateBound, value: number): number {
  if (value >= low && value <= high && Number.isFinite(value)) return value;
  if (absorbsLow && value < low) return low;
  return absorbsHigh && value > high ? high : Number.NaN;
}
