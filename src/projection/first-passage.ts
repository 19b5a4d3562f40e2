import { periodsFromFirst } from "./between-periods.js";

/** Where a path first reaches a level, in rows. */
export interface Passage {
  /** First whole row at or past the level. */
  readonly row: number;
  /** The same between rows: on the path's own curve where it is smooth, else on the straight line. */
  readonly between: number;
}

/** Which values count, and from which side a level is reached. */
export interface PassageQuestion {
  /** 1 where values rise to the level, -1 where they fall to it. */
  readonly sign: 1 | -1;
  /** One for all paths, or one a path. */
  readonly levels: Float64Array;
  /** First row that counts: a path that stands at or past the level there has reached it in that row. */
  readonly from: number;
  /** Last row that counts. */
  readonly to: number;
  /** First row from which the path is on one curve; later than 0 where other parameters hold from there on. */
  readonly curveFrom?: number;
}

/** Where each path passed a bound, and what the rule gave there; its row is -1 where it did not. */
export interface BoundsPassed {
  /** [paths] */
  readonly row: Int32Array;
  /** [paths] */
  readonly value: Float64Array;
}

/** Kept paths of one state or quantity. */
export interface KeptPaths {
  readonly paths: number;
  /** Values a path. */
  readonly rows: number;
  /** [paths, rows], row-major; NaN is no value. */
  readonly values: Float64Array;
  readonly passed?: BoundsPassed | undefined;
}

/** How far a value lies past a level: 0 or more where it is at or past it, negative where it falls short. */
export const pastBy = (value: number, level: number, sign: 1 | -1): number => sign * (value - level);

/**
 * The one place that decides when a level is reached: at the first row that counts and is at or past it. A value
 * exactly on the level has reached it. A jump across counts, also one beyond a bound at which the path then stays or
 * ends, because what the rule gave there is looked at.
 *
 * @param before - how far the value before lies past the level, negative where it lies short of it; NaN for none.
 * @param here - the same of the value here.
 * @returns the share of the period after which the level is reached; undefined where it is not.
 */
function reachedWithin(before: number, here: number): number | undefined {
  if (!(here >= 0)) return undefined;
  const share = before / (before - here);
  return before < 0 && here < Number.POSITIVE_INFINITY ? share : 1;
}

/**
 * First passage of one kept path; undefined where it never gets there.
 *
 * @param smooth - whether the path is free of random change and kinks, so that a curve joins its values.
 */
export function firstPassage(
  kept: KeptPaths,
  path: number,
  { sign, levels, from, to, curveFrom = 0 }: PassageQuestion,
  smooth: boolean,
): Passage | undefined {
  const level = levels[levels.length === 1 ? 0 : path]!;
  const { valueAt, known } = rawPath(kept, path);
  let before = Number.NaN;
  for (let row = from; row <= Math.min(to, kept.rows - 1); row++) {
    const here = pastBy(valueAt(row), level, sign);
    const share = reachedWithin(before, here);
    if (share !== undefined) {
      const straight = row - 1 + share;
      const curve = { from: curveFrom, to: known };
      const curved = smooth && row > from ? onCurve(valueAt, curve, row, level) : undefined;
      return { row, between: curved ?? straight };
    }
    before = here;
  }
  return undefined;
}

/** What the rule gave of a path, also beyond a bound; and how many of its values are the rule's own. */
function rawPath(
  { rows, values, passed }: KeptPaths,
  path: number,
): { readonly valueAt: (row: number) => number; readonly known: number } {
  const end = passed?.row[path] ?? -1;
  if (end < 0) return { valueAt: (row) => values[path * rows + row]!, known: rows };
  const beyond = passed!.value[path]!;
  return { valueAt: (row) => (row === end ? beyond : values[path * rows + row]!), known: end + 1 };
}

/** On the curve through the two values around the passage and one on either side, or two on one at an end. */
function onCurve(
  valueAt: (row: number) => number,
  { from, to }: { readonly from: number; readonly to: number },
  row: number,
  level: number,
): number | undefined {
  if (to - from < 4) return undefined;
  const first = Math.min(Math.max(row - 2, from), to - 4);
  const four = [0, 1, 2, 3].map((k) => valueAt(first + k));
  const found = periodsFromFirst(four, level);
  if (found === undefined) return undefined;
  const place = first + found;
  return place >= row - 1 && place <= row ? place : undefined;
}

/** A path that passed a bound in a row, and what the rule gave there. */
export interface BoundPassed {
  readonly path: number;
  readonly state: number;
  readonly value: number;
}

/** Follows first passages of many paths row by row. */
export interface PassageLog {
  /** Takes a row of values; of paths that pass a bound in it, what the rule gave. */
  readonly add: (row: number, values: Float64Array, passed: readonly BoundPassed[]) => void;
  /** [paths]: in rows, between two on a straight line; infinite for never. */
  readonly at: Float64Array;
}

export function passageLog(paths: number, { sign, levels, from, to }: PassageQuestion): PassageLog {
  const at = new Float64Array(paths).fill(Number.POSITIVE_INFINITY);
  const before = new Float64Array(paths).fill(Number.NaN);
  const look = (row: number, path: number, value: number): void => {
    const here = pastBy(value, levels[levels.length === 1 ? 0 : path]!, sign);
    const share = at[path] === Number.POSITIVE_INFINITY ? reachedWithin(before[path]!, here) : undefined;
    if (share !== undefined) at[path] = row - 1 + share;
    before[path] = here;
  };
  return {
    at,
    add(row, values, passed) {
      if (row < from || row > to) return;
      for (const { path, value } of passed) look(row, path, value);
      for (let path = 0; path < paths; path++) look(row, path, values[path]!);
    },
  };
}
