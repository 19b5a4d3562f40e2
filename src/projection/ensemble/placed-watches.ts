import type { Rule } from "../../rule/index.js";
import { refuseWatch } from "../refusals.js";
import { type CrossedLevel, crossedLevel, type Passage, type Watch } from "./passage.js";

/** A watch with its state's name and place. */
export type PlacedWatch = CrossedLevel & { readonly state: string; readonly place: number };

/** Finds the states that are watched. */
export function placedWatches(rule: Rule, watches: readonly Watch[] = []): readonly PlacedWatch[] {
  return watches.map((watch) => {
    const state = watch.state ?? rule.states[0]!;
    const place = rule.states.indexOf(state);
    if (place < 0) throw refuseWatch(state, rule.states);
    return { ...crossedLevel(watch), state, place };
  });
}

/** The passages that were found for watches. */
export function passagesOf(
  watches: readonly PlacedWatch[],
  found: readonly Float64Array[],
): readonly Passage[] {
  return watches.map((watch, i) => ({ ...crossedLevel(watch), state: watch.state, at: found[i]! }));
}
