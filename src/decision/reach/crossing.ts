import { type CrossedLevel, levelSide } from "../../projection/index.js";
import { periodsFromFirst } from "./between-periods.js";

/** Where a path first reaches a value. */
export interface Crossing {
  /** First whole period at or past the value: place in the path. */
  readonly period: number;
  /** The same between periods: on the path's own curve where it is smooth, else on the straight line. */
  readonly between: number;
}

/**
 * First place at which a path is at or past a level.
 *
 * @param path - read from `offset`, `length` values; NaN is no value.
 * @param smooth - whether the path is free of random change and kinks, so that a curve joins its values.
 * @returns undefined where the path never gets there.
 */
export function crossing(
  path: ArrayLike<number>,
  offset: number,
  length: number,
  level: CrossedLevel,
  smooth: boolean,
): Crossing | undefined {
  const { value, sign } = levelSide(level);
  for (let t = 0; t < length; t++) {
    const here = sign * (path[offset + t]! - value);
    if (!(here >= 0)) continue;
    if (t === 0) return { period: 0, between: 0 };
    const before = sign * (path[offset + t - 1]! - value);
    const straight = t - 1 + before / (before - here);
    const curved = smooth ? onCurve(path, offset, length, t, value) : undefined;
    return { period: t, between: curved ?? straight };
  }
  return undefined;
}

/** On the curve through the two values around the crossing and one on either side, or two on one at an end. */
function onCurve(
  path: ArrayLike<number>,
  offset: number,
  length: number,
  t: number,
  value: number,
): number | undefined {
  if (length < 4) return undefined;
  const first = Math.min(Math.max(t - 2, 0), length - 4);
  const four = [0, 1, 2, 3].map((k) => path[offset + first + k]!);
  const found = periodsFromFirst(four, value);
  if (found === undefined) return undefined;
  const place = first + found;
  return place >= t - 1 && place <= t ? place : undefined;
}
