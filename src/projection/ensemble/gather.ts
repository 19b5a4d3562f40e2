import { type Band, bandBuilder } from "./band.js";
import { type Growth, growthOf } from "./growth.js";
import { type PassageLog, passageLog } from "./passage.js";
import type { PlacedWatch } from "./placed-watches.js";

/** What is gathered of one state while an ensemble runs. */
export interface GatheredState {
  readonly bands: readonly Band[];
  /** [periods + 1], over the paths still in range. */
  readonly median: readonly number[];
  readonly mean: readonly number[];
  readonly standardDeviation: readonly number[];
  /** From the first to the last row; undefined for a state that is not positive throughout. */
  readonly growth: Growth | undefined;
  /** [paths, periods + 1], row-major; absent where paths are not kept. */
  readonly paths: Float64Array | undefined;
}

/** Gathers bands, moments, first passages and, where asked, the paths themselves, row by row. */
export interface Gatherer {
  readonly onRow: (t: number, values: readonly Float64Array[]) => void;
  readonly states: () => readonly GatheredState[];
  /** By watch: first passages, in rows. */
  readonly passages: readonly Float64Array[];
  /** [periods + 1]: paths that have ended by then. */
  readonly ended: readonly number[];
}

/** What `gatherer` is told. */
export interface GatherOptions {
  readonly kind: Band["kind"];
  readonly levels: readonly number[];
  readonly states: number;
  readonly paths: number;
  readonly periods: number;
  readonly keep: boolean;
  /** With the place of each watched state. */
  readonly watches: readonly PlacedWatch[];
}

export function gatherer(options: GatherOptions): Gatherer {
  const { kind, levels, states, paths, periods, keep } = options;
  const rows = periods + 1;
  const each = Array.from({ length: states }, () => ({
    bands: bandBuilder(kind, levels),
    mean: [] as number[],
    standardDeviation: [] as number[],
    paths: keep ? new Float64Array(paths * rows) : undefined,
    first: new Float64Array(paths),
    growth: undefined as Growth | undefined,
  }));
  const logs = options.watches.map((watch): PassageLog => passageLog(paths, watch));
  const ended: number[] = [];
  return {
    passages: logs.map((log) => log.at),
    ended,
    states: () =>
      each.map((state) => ({ ...state, bands: state.bands.bands(), median: state.bands.median() })),
    onRow(t, values) {
      logs.forEach((log, w) => {
        log.add(t, values[options.watches[w]!.place]!);
      });
      ended.push(endedOf(values[0]!));
      values.forEach((column, s) => {
        const state = each[s]!;
        const kept = state.paths;
        if (kept !== undefined)
          for (let path = 0; path < paths; path++) kept[path * rows + t] = column[path]!;
        noteGrowth(state, t, periods, column);
        const { mean, standardDeviation } = momentsOf(column);
        state.mean.push(mean);
        state.standardDeviation.push(standardDeviation);
        // Last, because it reorders the column.
        state.bands.add(column);
      });
    },
  };
}

function noteGrowth(
  state: { readonly first: Float64Array; growth: Growth | undefined },
  t: number,
  periods: number,
  column: Float64Array,
): void {
  if (t === 0) state.first.set(column);
  if (t === periods) state.growth = growthOf(state.first, column, periods);
}

function endedOf(values: Float64Array): number {
  let count = 0;
  for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) count++;
  return count;
}

/** Mean and standard deviation of the numbers among the values, in two passes. */
function momentsOf(values: Float64Array): { mean: number; standardDeviation: number } {
  let count = 0;
  let sum = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (Number.isNaN(value)) continue;
    count++;
    sum += value;
  }
  const mean = sum / count;
  let squares = 0;
  for (let i = 0; i < values.length; i++) {
    const off = values[i]! - mean;
    if (!Number.isNaN(off)) squares += off * off;
  }
  return { mean, standardDeviation: count < 2 ? Number.NaN : Math.sqrt(squares / (count - 1)) };
}
