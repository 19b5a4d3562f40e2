import { quantile } from "../../numeric/index.js";
import { placeRanks } from "./order-statistics.js";

/**
 * A band across draws, period by period. `mean path` carries the uncertainty of the parameters only; `future
 * observation` adds the errors of the process or of the reading; `simulated path` carries the random change alone, at
 * given parameters. None is an interval for a parameter.
 */
export interface Band {
  readonly kind: "mean path" | "future observation" | "simulated path";
  readonly level: number;
  /** [periods], quantiles by definition 7 over the paths still in range; NaN where none is. */
  readonly lower: readonly number[];
  readonly upper: readonly number[];
}

/** Gathers bands period by period, so that no more than one period of all paths is ever held. */
export interface BandBuilder {
  /** Takes the values of all paths at the next period; the array is reordered. NaN counts as out of range. */
  readonly add: (values: Float64Array) => void;
  readonly bands: () => readonly Band[];
  /** [periods], the middle of the paths. */
  readonly median: () => readonly number[];
}

/** Bands of each level of one kind. */
export function bandBuilder(kind: Band["kind"], levels: readonly number[]): BandBuilder {
  const lower = levels.map((): number[] => []);
  const upper = levels.map((): number[] => []);
  const middle: number[] = [];
  const probabilities = [0.5, ...levels.flatMap((level) => [(1 - level) / 2, (1 + level) / 2])];
  return {
    add(values) {
      const live = liveFirst(values);
      if (live.length > 0) placeRanks(live, ranksOf(live.length, probabilities));
      const at = (probability: number): number =>
        live.length === 0 ? Number.NaN : quantile(live, probability);
      middle.push(at(0.5));
      levels.forEach((level, l) => {
        lower[l]!.push(at((1 - level) / 2));
        upper[l]!.push(at((1 + level) / 2));
      });
    },
    bands: () => levels.map((level, l) => ({ kind, level, lower: lower[l]!, upper: upper[l]! })),
    median: () => middle,
  };
}

/** The numbers, moved to the front. */
function liveFirst(values: Float64Array): Float64Array {
  let count = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (!Number.isNaN(value)) values[count++] = value;
  }
  return values.subarray(0, count);
}

/** Places of the order statistics that quantiles by definition 7 read. */
function ranksOf(count: number, probabilities: readonly number[]): readonly number[] {
  const places = probabilities.flatMap((probability) => {
    const place = Math.floor((count - 1) * probability);
    return [place, Math.min(place + 1, count - 1)];
  });
  return [...new Set(places)].sort((a, b) => a - b);
}
