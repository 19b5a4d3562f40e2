export type Direction = "rising" | "falling";

/** Where a path first reaches a value. */
export interface Crossing {
  /** First whole period at or past the value: place in the path. */
  readonly period: number;
  /** The same between periods, on the straight line from the period before. */
  readonly between: number;
}

/**
 * First place at which a path is at or past a value, from below (`rising`) or from above (`falling`).
 *
 * @param path - read from `offset`, `length` values.
 * @returns undefined where the path never gets there.
 */
export function crossing(
  path: ArrayLike<number>,
  offset: number,
  length: number,
  value: number,
  direction: Direction,
): Crossing | undefined {
  const sign = direction === "rising" ? 1 : -1;
  for (let t = 0; t < length; t++) {
    const here = sign * (path[offset + t]! - value);
    if (here < 0) continue;
    if (t === 0) return { period: 0, between: 0 };
    const before = sign * (path[offset + t - 1]! - value);
    return { period: t, between: t - 1 + before / (before - here) };
  }
  return undefined;
}
