/** Which way a state gets to a value. */
export type Direction = "rising" | "falling";

/** A value whose first passage is followed while paths run. */
export interface Watch {
  /** Default: the only state. */
  readonly state?: string;
  /** In the state's unit. */
  readonly value: number;
  readonly direction: Direction;
}

/** First passages of a watched value. */
export interface Passage {
  readonly state: string;
  readonly value: number;
  readonly direction: Direction;
  /** [paths]: row of the path at which it is first at or past the value, between rows on a straight line; infinite for never. */
  readonly at: Float64Array;
}

/** Follows first passages row by row. */
export interface PassageLog {
  readonly add: (t: number, values: Float64Array) => void;
  readonly at: Float64Array;
}

export function passageLog(paths: number, value: number, direction: Direction): PassageLog {
  const sign = direction === "rising" ? 1 : -1;
  const at = new Float64Array(paths).fill(Number.POSITIVE_INFINITY);
  const before = new Float64Array(paths);
  return {
    at,
    add(t, values) {
      for (let path = 0; path < paths; path++) {
        const here = sign * (values[path]! - value);
        if (here >= 0 && at[path] === Number.POSITIVE_INFINITY)
          at[path] = t === 0 ? 0 : t - 1 + before[path]! / (before[path]! - here);
        before[path] = here;
      }
    },
  };
}
