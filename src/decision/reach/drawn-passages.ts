import type { GroupForecast } from "../../projection/index.js";
import { refuseNotWatched } from "../refusals.js";
import { crossing } from "./crossing.js";
import type { ReachQuestion } from "./reach.js";

/**
 * First passages of every draw in rows, sorted; infinite for never.
 *
 * They are read from the kept paths, those without reading errors where the error is one of observation, or from
 * what was watched where paths were too many to keep.
 */
export function drawnPassages(
  group: GroupForecast,
  place: number,
  question: ReachQuestion,
  smooth: boolean,
): Float64Array {
  const { state, margin } = question;
  const watched = group.passages.find(
    (each) => each.state === state && each.risesTo === question.risesTo && each.fallsTo === question.fallsTo,
  );
  const kept = margin === "parameters" ? group.ensemble.mean[place] : group.ensemble.future[place];
  if (kept === undefined) {
    if (watched === undefined) throw refuseNotWatched(state, question);
    return watched.at.slice().sort();
  }
  const length = group.index.length;
  const curved = smooth && margin === "parameters";
  return Float64Array.from({ length: group.ensemble.paths }, (_, path) => {
    const at = crossing(kept, path * length, length, question, curved);
    return at === undefined ? Number.POSITIVE_INFINITY : at.between;
  }).sort();
}
