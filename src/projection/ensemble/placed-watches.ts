import type { Rule } from "../../rule/index.js";
import type { PassageQuestion } from "../first-passage.js";
import {
  type CrossedLevel,
  checkLevel,
  crossedLevel,
  type LevelSource,
  levelSide,
  levelValues,
  placeOf,
} from "../levels.js";

/** A level whose first passage is followed while paths run. */
export type Watch = CrossedLevel & {
  /** A state or quantity; default the first state. */
  readonly state?: string;
};

/** First passages of a watched level. */
export type WatchedPassage = CrossedLevel & {
  readonly state: string;
  /** [paths]: row of the path at which it is first at or past the level, between rows on a straight line; infinite for never. */
  readonly at: Float64Array;
};

/** A watch with its name, its place among states and quantities, and what counts. */
export type PlacedWatch = CrossedLevel & PassageQuestion & { readonly state: string; readonly place: number };

/** Finds what is watched, and its levels for every path; only what lies ahead of the present counts. */
export function placedWatches(
  rule: Rule,
  watches: readonly Watch[] | undefined,
  source: LevelSource,
  present: number,
): readonly PlacedWatch[] {
  return (watches ?? []).map((watch) => {
    const state = watch.state ?? rule.states[0]!;
    const place = placeOf(rule, state);
    checkLevel(rule, state, watch);
    return {
      ...crossedLevel(watch),
      state,
      ...passageQuestion(rule.states.length, place, watch, source, present),
    };
  });
}

/**
 * What counts when a level is to be reached ahead of the present: the present value of a state does, the period of a
 * quantity that has ended does not.
 */
export function passageQuestion(
  states: number,
  place: number,
  asked: CrossedLevel,
  source: LevelSource,
  present: number,
): PassageQuestion & { readonly place: number } {
  return {
    place,
    sign: levelSide(asked).sign,
    levels: levelValues(asked, source),
    from: place < states ? present : present + 1,
    to: Number.POSITIVE_INFINITY,
  };
}

/** The passages that were found for watches. */
export function passagesOf(
  watches: readonly PlacedWatch[],
  found: readonly Float64Array[],
): readonly WatchedPassage[] {
  return watches.map((watch, i) => ({ ...crossedLevel(watch), state: watch.state, at: found[i]! }));
}
