import type { Fit } from "../../estimate/index.js";
import {
  type Forecast,
  firstPassage,
  type GroupForecast,
  type KeptPaths,
  type LevelSource,
  type PassageQuestion,
  passageQuestion,
  pastBy,
  placeOf,
  type Simulation,
  sameLevel,
} from "../../projection/index.js";
import { nonsmoothCalls, type Rule } from "../../rule/index.js";
import { notWatchedError } from "../errors.js";
import type { ReachQuestion } from "./reach.js";

/** A level of one group: where it is looked for, and what counts. */
export type GroupQuestion = ReachQuestion & {
  readonly of: Rule;
  readonly fit: Fit | undefined;
  readonly place: number;
  /** Whether a curve joins the values of a path that chance does not move. */
  readonly smooth: boolean;
  /** Row of the present. */
  readonly present: number;
  /** First row that counts: the present, or the first of all where the level was passed within the record. */
  readonly from: number;
};

/** Makes a question ready for one group. */
export function groupQuestion(
  ahead: Forecast | Simulation,
  group: GroupForecast,
  asked: ReachQuestion,
): GroupQuestion {
  const fit = ahead.kind === "forecast" ? ahead.fit : undefined;
  const rule = ahead.kind === "forecast" ? ahead.fit.rule : ahead.rule;
  const { kinks, jumps } = nonsmoothCalls(rule);
  const place = placeOf(rule, asked.state);
  const present = group.index.indexOf(group.recordEnd);
  const { sign, levels } = passageQuestion(
    rule.states.length,
    place,
    asked,
    group.ensemble.levels.central,
    present,
  );
  const now = group.ensemble.central[place]!.values[present]!;
  // What the fitted path has passed by the present happened within the record.
  const passed = present > 0 && pastBy(now, levels[0]!, sign) >= 0;
  const smooth = rule.inputs.length === 0 && kinks.length + jumps.length === 0;
  return { ...asked, of: rule, fit, place, smooth, present, from: passed ? 0 : present };
}

/** Which values count from a row on, and where the level lies. */
export function counted(question: GroupQuestion, source: LevelSource, from: number): PassageQuestion {
  return passageQuestion(question.of.states.length, question.place, question, source, from);
}

/**
 * First passages of every path from a row on, in rows; infinite for never. They are read from the kept paths of
 * the process, or from what was watched where paths were too many to keep.
 */
export function drawnPassages(group: GroupForecast, question: GroupQuestion, from: number): Float64Array {
  const { place, state, smooth, margin } = question;
  const { process, passed, paths, levels } = group.ensemble;
  const values = process[place];
  if (values === undefined) {
    const watched = group.passages.find((each) => each.state === state && sameLevel(each, question));
    if (watched === undefined) throw notWatchedError(state, question);
    return watched.at;
  }
  const kept: KeptPaths = { paths, rows: group.index.length, values, passed: passed[place] };
  const curved = smooth && margin === "parameters";
  const asked = counted(question, levels.paths, from);
  return Float64Array.from({ length: paths }, (_, path) => {
    const at = firstPassage(kept, path, asked, curved);
    return at === undefined ? Number.POSITIVE_INFINITY : at.between;
  });
}

/** Share of the paths that ended outside their range and had not got there. */
export function leftShare({ ensemble, left }: GroupForecast, place: number, coming: Float64Array): number {
  const last = ensemble.process[place];
  // Of paths that were not kept it is only known how many have ended.
  if (last === undefined) return left;
  const rows = ensemble.periods + 1;
  return share(
    coming,
    (at, path) => at === Number.POSITIVE_INFINITY && Number.isNaN(last[path * rows + rows - 1]!),
  );
}

export function share(values: Float64Array, holds: (value: number, path: number) => boolean): number {
  return values.reduce((count, value, path) => count + Number(holds(value, path)), 0) / values.length;
}

/** A first period at or past the level: its row, its share of the paths, and the share that is there by then. */
export interface FirstPeriod {
  readonly row: number;
  readonly share: number;
  readonly by: number;
}

/** First periods at or past the level, with their shares of the paths. */
export function distributionOf(found: Float64Array): readonly FirstPeriod[] {
  const counts = new Map<number, number>();
  for (const at of found) {
    if (!Number.isFinite(at)) break;
    const row = Math.ceil(at);
    counts.set(row, (counts.get(row) ?? 0) + 1);
  }
  let sum = 0;
  return [...counts].map(([row, count]) => {
    sum += count;
    return { row, share: count / found.length, by: sum / found.length };
  });
}
