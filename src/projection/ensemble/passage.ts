/** A level that a state is to get to: from below (`risesTo`) or from above (`fallsTo`), in the state's unit. */
export type CrossedLevel =
  | { readonly risesTo: number; readonly fallsTo?: never }
  | { readonly fallsTo: number; readonly risesTo?: never };

/** A level with the side from which it is reached: 1 where values rise to it, -1 where they fall to it. */
export interface LevelSide {
  readonly value: number;
  readonly sign: 1 | -1;
}

export function levelSide({ risesTo, fallsTo }: CrossedLevel): LevelSide {
  return risesTo === undefined ? { value: fallsTo, sign: -1 } : { value: risesTo, sign: 1 };
}

/** A level as it was asked for, without what stood beside it. */
export function crossedLevel({ risesTo, fallsTo }: CrossedLevel): CrossedLevel {
  return risesTo === undefined ? { fallsTo } : { risesTo };
}

/** A level whose first passage is followed while paths run. */
export type Watch = CrossedLevel & {
  /** Default: the only state. */
  readonly state?: string;
};

/** First passages of a watched level. */
export type Passage = CrossedLevel & {
  readonly state: string;
  /** [paths]: row of the path at which it is first at or past the level, between rows on a straight line; infinite for never. */
  readonly at: Float64Array;
};

/** Follows first passages row by row. */
export interface PassageLog {
  readonly add: (t: number, values: Float64Array) => void;
  readonly at: Float64Array;
}

export function passageLog(paths: number, level: CrossedLevel): PassageLog {
  const { value, sign } = levelSide(level);
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
