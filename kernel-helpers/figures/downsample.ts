import type { Places } from "./layer.js";

/** The plotted points of a long series: their indices, and the number of all points. */
export interface Downsampled {
  readonly kept: readonly number[];
  readonly of: number;
}

/** Layers with more points than this are downsampled. */
const maxPoints = 2000;

/**
 * Selects the points of a long series to plot: of each run of neighbours the first one and the extremes on both axes, so
 * that no extreme is lost.
 *
 * @returns undefined when all points are plotted.
 */
export function downsample(x: Places, y: Places): Downsampled | undefined {
  const n = Math.min(x.length, y.length);
  if (n <= maxPoints) return undefined;
  const runs = Math.floor(maxPoints / 5);
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

/** Indices of the smallest and largest number in a run; none when it has no number. */
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
