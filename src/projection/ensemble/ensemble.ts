import type { RandomStream } from "../../numeric/index.js";
import type { CompiledRule, StateBound } from "../../rule/index.js";
import type { BoundPassed } from "../first-passage.js";
import type { NoiseDraw } from "../noise/noise.js";
import { blockSize } from "./block-streams.js";
import { readingColumns } from "./readings.js";
import { type Scatter, scatterer } from "./scatter.js";
import { type Settler, settler } from "./settle.js";

/** Where every path of an ensemble begins: its parameters and its state vector, one row a path. */
export interface Starts {
  readonly paths: number;
  /** How many parameters the rule has. */
  readonly size: number;
  /** [paths, size], or [1, size] where all paths share them. */
  readonly parameters: Float64Array;
  /** [paths, width], or [1, width] where all paths begin alike. */
  readonly initial: Float64Array;
}

/** What an ensemble shows in one row. Arrays are not to be kept; whoever reads them last may reorder them. */
export interface EnsembleRow {
  /** [states][paths]; NaN where a path has ended. */
  readonly values: readonly Float64Array[];
  /** [states][paths], with factor and error of the observation; the same arrays as `values` where there is neither. */
  readonly readings: readonly Float64Array[];
  /** [quantities][paths], of the period that ends in this row; NaN in the first. Empty unless asked for. */
  readonly quantities: readonly Float64Array[];
  /** Paths that pass a bound in this row. */
  readonly passed: readonly BoundPassed[];
}

/** A run of many paths of one rule. */
export interface EnsembleRun {
  readonly compiled: CompiledRule;
  /** By state. */
  readonly bounds: readonly StateBound[];
  /** By state: within which values its observations lie; default its bounds. */
  readonly observable?: readonly (readonly [number, number])[];
  /** Length of the state vector with its past values. */
  readonly width: number;
  readonly inputs: readonly Float64Array[];
  /** Absolute period of the first values. */
  readonly from: number;
  readonly periods: number;
  readonly starts: Starts;
  /** Other parameters that hold from a row on, shaped as those of `starts`. */
  readonly ahead?: { readonly row: number; readonly parameters: Float64Array } | undefined;
  /** By state: the random change of each period; undefined for none. */
  readonly change: readonly (NoiseDraw | undefined)[];
  /** By state: the error of an observation, put on what is reported and not carried on. */
  readonly reading: readonly (NoiseDraw | undefined)[];
  /** By state: what a reading is a multiple of, [paths] or [1]; absent for the state itself. */
  readonly factors?: readonly (Float64Array | undefined)[] | undefined;
  /** How many quantities are reported; 0 where nobody asks for them. */
  readonly quantities?: number;
  /** [paths]: by how much the normal errors of a path are wider than its draws say; absent for not at all. */
  readonly spread?: Float64Array | undefined;
  /** One a block of paths; see `blockStreams`. */
  readonly streams: readonly RandomStream[];
  readonly onRow: (t: number, row: EnsembleRow) => void;
  /** Called after every block of a period; what it throws ends the run. */
  readonly onProgress?: ((done: number, of: number) => void) | undefined;
}

/**
 * Runs all paths together, one period after another: memory holds one state vector a path, whatever the number of
 * periods.
 */
export function runEnsemble(run: EnsembleRun): void {
  const { starts, width, periods } = run;
  const { paths } = starts;
  const present = new Float64Array(paths * width);
  for (let path = 0; path < paths; path++) present.set(rowOf(starts.initial, path, width), path * width);
  const scatter = scatterer(run.streams, [...run.change, ...run.reading], run.spread);
  const moves: Moves = { run, scatter, settler: settler(run.bounds, paths, width), present };
  // Copies of the states, because who takes a row may reorder it.
  const values = run.bounds.map(() => new Float64Array(paths));
  const readings = readingColumns(run, scatter, moves.settler, values);
  const quantities = Array.from({ length: run.quantities ?? 0 }, () =>
    new Float64Array(paths).fill(Number.NaN),
  );
  for (let t = 0; t <= periods; t++) {
    const passed: BoundPassed[] = [];
    const told = (each: BoundPassed): number => passed.push(each);
    for (let block = 0; block * blockSize < paths; block++) {
      const first = block * blockSize;
      const last = Math.min(first + blockSize, paths);
      if (t > 0) advanceBlock(moves, quantities, first, last, t, block);
      moves.settler.settle(present, first, last, told);
      report(present, width, first, last, values);
      readings.report(first, last, block);
      run.onProgress?.(t * paths + last, (periods + 1) * paths);
    }
    run.onRow(t, { values, readings: readings.columns, quantities, passed });
  }
}

interface Moves {
  readonly run: EnsembleRun;
  readonly scatter: Scatter;
  readonly settler: Settler;
  readonly present: Float64Array;
}

/** One period of a block: what happens inside it, then the rule, then its random change. */
function advanceBlock(
  { run, scatter, present }: Moves,
  quantities: readonly Float64Array[],
  first: number,
  last: number,
  t: number,
  block: number,
): void {
  const { compiled, inputs, starts, ahead, width, change } = run;
  const from = run.from + t - 1;
  const parameters = ahead !== undefined && t > ahead.row ? ahead.parameters : starts.parameters;
  const shared = parameters.length === starts.size;
  if (quantities.length > 0)
    compiled.quantities(present, first, last, parameters, shared ? 0 : starts.size, inputs, from, quantities);
  (shared ? compiled.advance : compiled.advanceEach)(present, first, last, parameters, inputs, from);
  change.forEach((draw, s) => {
    if (draw !== undefined) scatter(draw, present, first * width + s, width, last - first, block);
  });
}

function rowOf(rows: Float64Array, path: number, width: number): Float64Array {
  return rows.length === width ? rows : rows.subarray(path * width, (path + 1) * width);
}

function report(
  present: Float64Array,
  width: number,
  first: number,
  last: number,
  values: readonly Float64Array[],
): void {
  values.forEach((column, s) => {
    if (width === 1) column.set(present.subarray(first, last), first);
    else for (let path = first; path < last; path++) column[path] = present[path * width + s]!;
  });
}
