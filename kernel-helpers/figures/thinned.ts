import type { Places } from "./layer.js";

/** Points kept of a long series: their places in it, and how many there were. */
export interface Thinned {
  readonly kept: readonly number[];
  readonly of: number;
}

/** More points than this a layer are thinned: a screen has no room to show them apart. */
const most = 2000;

/**
 * Picks the points of a long series to draw: from each run of neighbours the first, and those with the least and
 * greatest value on either axis, so that no extreme is lost.
 *
 * @returns undefined when all may be drawn.
 */
export function thinned(x: Places, y: Places): Thinned | undefined {
  const n = Math.min(x.length, y.length);
  if (n <= most) return undefined;
  const runs = Math.floor(most / 5);
  const kept: number[] = [];
  for (let run = 0; run < runs; run++) {
    const from = Math.floor((run * n) / runs);
    const to = Math.floor(((run + 1) * n) / runs);
    const places = new Set([from, ...extremes(x, from, to), ...extremes(y, from, to)]);
    kept.push(...[...places].sort((a, b) => a - b));
  }
  if (kept.at(-1) !== n - 1) kept.push(n - 1);
  return { kept, of: n };
}

/** Places of the least and greatest number in a run; none where it holds no number. */
function extremes(values: Places, from: number, to: number): number[] {
  let least = -1;
  let greatest = -1;
  for (let i = from; i < to; i++) {
    const value = values[i];
    if (typeof value !== "number" || Number.isNaN(value)) continue;
    if (least < 0 || value < (values[least] as number)) least = i;
    if (greatest < 0 || value > (values[greatest] as number)) greatest = i;
  }
  return least < 0 ? [] : [least, greatest];
}
