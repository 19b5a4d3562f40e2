import { type StateBound, withinBound } from "../../rule/index.js";
import type { BoundPassed } from "../first-passage.js";

/** What has become of a state of a path: 0 while it is free. */
const mark = { low: 1, high: 2, ended: 3 } as const;

/** Keeps the paths of an ensemble within the bounds of their states. */
export interface Settler {
  /** Settles the paths first..last-1 of `present`, and tells of each that passes a bound now. */
  readonly settle: (
    present: Float64Array,
    first: number,
    last: number,
    told: (passed: BoundPassed) => void,
  ) => void;
  /** Whether a state of a path stays at a bound for good. */
  readonly isAbsorbed: (path: number, state: number) => boolean;
}

/**
 * A state that passes a bound that absorbs is put on the bound and stays there, whatever the rule and chance make of
 * it later. One that passes another bound, or is not finite, ends its path: all values are NaN from there on.
 *
 * @param width - length of a state vector, past values included.
 */
export function settler(bounds: readonly StateBound[], paths: number, width: number): Settler {
  const states = bounds.length;
  const marks = new Uint8Array(paths * states);
  const open = bounds.every(({ low, high }) => low === -high && high === Number.POSITIVE_INFINITY);
  let anyMark = false;
  const end = (present: Float64Array, path: number, told: (passed: BoundPassed) => void): void => {
    for (let state = 0; state < states; state++) told({ path, state, value: present[path * width + state]! });
    marks.fill(mark.ended, path * states, (path + 1) * states);
  };
  return {
    isAbsorbed: (path, state) => {
      const own = marks[path * states + state]!;
      return own === mark.low || own === mark.high;
    },
    settle(present, first, last, told) {
      if (open && !anyMark && allFinite(present, first * width, last * width)) return;
      for (let path = first; path < last; path++) {
        for (let state = 0; state < states; state++) settleOne(present, path, state, told);
        if (marks[path * states] === mark.ended) present.fill(Number.NaN, path * width, (path + 1) * width);
      }
    },
  };

  function settleOne(
    present: Float64Array,
    path: number,
    state: number,
    told: (passed: BoundPassed) => void,
  ): void {
    const at = path * width + state;
    const own = marks[path * states + state]!;
    const bound = bounds[state]!;
    const value = present[at]!;
    if (own === 0) {
      if (value > bound.low && value < bound.high) return;
      settleBeyond(present, path, state, withinBound(bound, value), told);
    } else if (own !== mark.ended) present[at] = own === mark.low ? bound.low : bound.high;
  }

  function settleBeyond(
    present: Float64Array,
    path: number,
    state: number,
    kept: number,
    told: (passed: BoundPassed) => void,
  ): void {
    const value = present[path * width + state]!;
    if (kept === value) return;
    anyMark = true;
    if (Number.isNaN(kept)) {
      end(present, path, told);
      return;
    }
    marks[path * states + state] = value < kept ? mark.low : mark.high;
    told({ path, state, value });
    present[path * width + state] = kept;
  }
}

/** One sum of differences that are 0 for numbers and NaN for all else: no branch a value. */
function allFinite(values: Float64Array, from: number, to: number): boolean {
  let zero = 0;
  for (let at = from; at < to; at++) zero += values[at]! - values[at]!;
  return zero === 0;
}
