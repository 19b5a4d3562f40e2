import { type BoundsPassed, type PassageLog, type PassageQuestion, passageLog } from "../first-passage.js";
import { type Band, bandBuilder } from "./band.js";
import type { EnsembleRow } from "./ensemble.js";
import { type Growth, growthOf } from "./growth.js";

/** What is gathered of one state while an ensemble runs. */
export interface GatheredState {
  /** Of what would be observed. */
  readonly bands: readonly Band[];
  /** [periods + 1], over the paths that have not ended. */
  readonly median: readonly number[];
  readonly standardDeviation: readonly number[];
  /** From the first to the last row; undefined for a state that is not positive throughout. */
  readonly growth: Growth | undefined;
  /** [paths, periods + 1], row-major: what would be observed; absent where paths are not kept. */
  readonly paths: Float64Array | undefined;
}

/** Gathers bands, moments, first passages and, where asked, the paths themselves, row by row. */
export interface Gatherer {
  readonly onRow: (t: number, row: EnsembleRow) => void;
  readonly states: () => readonly GatheredState[];
  /** By watch: first passages, in rows. */
  readonly passages: readonly Float64Array[];
  /** By state and then by quantity, [paths, periods + 1]: the process itself; empty where paths are not kept. */
  readonly process: readonly Float64Array[];
  /** By state: where paths passed a bound. */
  readonly passed: readonly BoundsPassed[];
  /** Paths that have ended by the last row. */
  readonly ended: () => number;
}

/** What is gathered. */
export interface GatherOptions {
  readonly kind: Band["kind"];
  readonly levels: readonly number[];
  readonly states: number;
  readonly quantities: number;
  readonly paths: number;
  readonly periods: number;
  /** Whether paths are kept, and whether those of the process are. */
  readonly keep: boolean;
  readonly keepProcess?: boolean;
  /** With the place of each among states and then quantities. */
  readonly watches: readonly (PassageQuestion & { readonly place: number })[];
}

export function gatherer(options: GatherOptions): Gatherer {
  const { kind, levels, states, quantities, paths, periods, keep, keepProcess = keep } = options;
  const rows = periods + 1;
  const table = (): Float64Array => new Float64Array(paths * rows);
  const each = Array.from({ length: states }, () => ({
    bands: bandBuilder(kind, levels),
    standardDeviation: [] as number[],
    process: keepProcess ? table() : undefined,
    first: new Float64Array(paths),
    growth: undefined as Growth | undefined,
    passed: { row: new Int32Array(paths).fill(-1), value: new Float64Array(paths) },
  }));
  const observed = new Map<number, Float64Array>();
  const inside = Array.from({ length: keepProcess ? quantities : 0 }, table);
  const logs = options.watches.map((watch): PassageLog => passageLog(paths, watch));
  let ended = 0;
  return {
    passages: logs.map((log) => log.at),
    process: [...each.flatMap((state) => state.process ?? []), ...inside],
    passed: each.map((state) => state.passed),
    ended: () => ended,
    states: () =>
      each.map((state, s) => ({
        bands: state.bands.bands(),
        median: state.bands.median(),
        standardDeviation: state.standardDeviation,
        growth: state.growth,
        paths: observed.get(s) ?? state.process,
      })),
    onRow(t, row) {
      notePassages(t, row);
      ended = endedOf(row.values[0]!);
      each.forEach((state, s) => {
        const [value, reading] = [row.values[s]!, row.readings[s]!];
        keepRow(state.process, rows, t, value);
        if (keep && reading !== value) keepRow(observedOf(s), rows, t, reading);
        if (t === 0) state.first.set(value);
        if (t === periods) state.growth = growthOf(state.first, value, periods);
        state.standardDeviation.push(standardDeviationOf(reading));
      });
      inside.forEach((column, q) => {
        keepRow(column, rows, t, row.quantities[q]!);
      });
      // Last, because it reorders the columns.
      each.forEach((state, s) => {
        state.bands.add(row.readings[s]!);
      });
    },
  };

  /** What is observed of a state, kept apart only where it is not the state itself. */
  function observedOf(state: number): Float64Array {
    const known = observed.get(state) ?? table();
    observed.set(state, known);
    return known;
  }

  function notePassages(t: number, { values, quantities: within, passed }: EnsembleRow): void {
    logs.forEach((log, w) => {
      const { place } = options.watches[w]!;
      const own = passed.filter(({ state }) => state === place);
      log.add(t, place < states ? values[place]! : within[place - states]!, own);
    });
    for (const { path, state, value } of passed) noteBound(each[state]!.passed, path, t, value);
  }
}

/** A path that ends is told of in every state, also one that stays at a bound already: the first time counts. */
function noteBound(passed: BoundsPassed, path: number, row: number, value: number): void {
  if (passed.row[path]! >= 0) return;
  passed.row[path] = row;
  passed.value[path] = value;
}

function keepRow(kept: Float64Array | undefined, rows: number, t: number, column: Float64Array): void {
  if (kept === undefined) return;
  for (let path = 0; path < column.length; path++) kept[path * rows + t] = column[path]!;
}

function endedOf(values: Float64Array): number {
  let count = 0;
  for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) count++;
  return count;
}

/** Standard deviation of the numbers among the values, in two passes. */
function standardDeviationOf(values: Float64Array): number {
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
  return count < 2 ? Number.NaN : Math.sqrt(squares / (count - 1));
}
