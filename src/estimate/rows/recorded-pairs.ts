import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { slotsOf } from "../unknowns/slots.js";

/** Pairs of rows between which a rule steps. All arrays have one entry a pair. */
export interface RecordedPairs {
  /** Rows of the group. */
  readonly from: Int32Array;
  readonly to: Int32Array;
  /** Steps from one to the other: 1, or more over a gap. */
  readonly spans: Int32Array;
  /** [pairs, slots]: the row of the group that holds each value of the state vector where the pair begins. */
  readonly sources: Int32Array;
}

/**
 * The pairs of a group: to every row from the nearest earlier one at which all that the rule reads is recorded.
 * A pair that lies k periods apart is a k-step pair; a gap is never closed up.
 */
export function recordedPairs(rule: Rule, group: ObservedGroup): RecordedPairs {
  const slots = slotsOf(rule);
  const entryAt = new Map(Array.from(group.index, (period, entry) => [period, entry]));
  const complete = (entry: number): readonly number[] | undefined => {
    const rows = slots.map(({ state, lag }) => {
      const row = entryAt.get(group.index[entry]! - lag);
      return row === undefined || Number.isNaN(group.values[state]![row]!) ? -1 : row;
    });
    return rows.includes(-1) ? undefined : rows;
  };
  const pairs: { from: number; to: number; rows: readonly number[] }[] = [];
  let last: { entry: number; rows: readonly number[] } | undefined;
  for (let entry = 0; entry < group.index.length; entry++) {
    if (last !== undefined) pairs.push({ from: last.entry, to: entry, rows: last.rows });
    const rows = complete(entry);
    if (rows !== undefined) last = { entry, rows };
  }
  return {
    from: Int32Array.from(pairs, ({ from }) => from),
    to: Int32Array.from(pairs, ({ to }) => to),
    spans: Int32Array.from(pairs, ({ from, to }) => group.index[to]! - group.index[from]!),
    sources: Int32Array.from(pairs.flatMap(({ rows }) => rows)),
  };
}
