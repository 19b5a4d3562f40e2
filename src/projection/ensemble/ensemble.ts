import type { RandomStream } from "../../numeric/index.js";
import type { CompiledRule } from "../../rule/index.js";
import type { NoiseDraw } from "../noise/noise.js";
import { blockSize } from "./block-streams.js";
import { endOutside, finiteLimits, unlimited } from "./limits.js";
import { type Scatter, scatterer } from "./scatter.js";

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

/** A run of many paths of one rule. */
export interface EnsembleRun {
  readonly compiled: CompiledRule;
  /** How many states, and the length of the state vector with its past values. */
  readonly states: number;
  readonly width: number;
  readonly inputs: readonly Float64Array[];
  /** Absolute period of the first values. */
  readonly from: number;
  readonly periods: number;
  readonly starts: Starts;
  /** By state: the random change of each period; undefined for none. */
  readonly change: readonly (NoiseDraw | undefined)[];
  /** By state: the error of a reading, put on what is reported and not carried on. */
  readonly reading: readonly (NoiseDraw | undefined)[];
  /** By state: values outside end their path. */
  readonly limits: readonly (readonly [number, number])[];
  /** [paths]: by how much the normal errors of a path are wider than its draws say; absent for not at all. */
  readonly spread?: Float64Array | undefined;
  /** One a block of paths; see `blockStreams`. */
  readonly streams: readonly RandomStream[];
  /** Told of every step before it is taken: the path, its state vector and parameters, and the absolute period. */
  readonly onStep?: (path: number, state: Float64Array, parameters: Float64Array, t: number) => void;
  /** Takes the values of all paths at row `t`, [states][paths]; NaN where a path has ended. Not to be kept; may be reordered. */
  readonly onRow: (t: number, values: readonly Float64Array[]) => void;
  /** Called after every block of a period; what it throws ends the run. */
  readonly onProgress?: (done: number, of: number) => void;
}

/**
 * Runs all paths abreast, one period after another: memory holds one state vector a path, whatever the number of
 * periods.
 */
export function runEnsemble(run: EnsembleRun): void {
  const { starts, width, states, periods } = run;
  const { paths } = starts;
  const present = new Float64Array(paths * width);
  for (let path = 0; path < paths; path++) present.set(rowOf(starts.initial, path, width), path * width);
  // A copy of the states, because who takes a row may reorder it.
  const reported = Array.from({ length: states }, () => new Float64Array(paths));
  const moves: Moves = {
    run,
    scatter: scatterer(run.streams, [...run.change, ...run.reading], run.spread),
    limits: finiteLimits(run.limits),
  };
  for (let t = 0; t <= periods; t++) {
    for (let block = 0; block * blockSize < paths; block++) {
      const first = block * blockSize;
      const last = Math.min(first + blockSize, paths);
      if (t > 0) advanceBlock(moves, present, first, last, t, block);
      report(moves, present, first, last, reported, block);
      run.onProgress?.(t * paths + last, (periods + 1) * paths);
    }
    run.onRow(t, reported);
  }
}

interface Moves {
  readonly run: EnsembleRun;
  readonly scatter: Scatter;
  /** [states, 2], all finite. */
  readonly limits: Float64Array;
}

/** One period of a block: the rule, then its random change, then the look at the limits. */
function advanceBlock(
  { run, scatter, limits }: Moves,
  present: Float64Array,
  first: number,
  last: number,
  t: number,
  block: number,
): void {
  const { compiled, inputs, starts, width, change } = run;
  const from = run.from + t - 1;
  const random = change.some((draw) => draw !== undefined);
  const advance = starts.parameters.length === starts.size ? compiled.advance : compiled.advanceEach;
  if (run.onStep !== undefined) tellSteps(run, present, first, last, from);
  // Random change may bring a value back, so limits count after it.
  advance(present, first, last, starts.parameters, inputs, from, random ? unlimited(limits.length) : limits);
  if (!random) return;
  change.forEach((draw, s) => {
    if (draw !== undefined) scatter(draw, present, first * width + s, width, last - first, block);
  });
  endOutside(limits, present, first, last, width);
}

function rowOf(rows: Float64Array, path: number, width: number): Float64Array {
  return rows.length === width ? rows : rows.subarray(path * width, (path + 1) * width);
}

/** Tells of the steps that a block is about to take; ended paths take none. */
function tellSteps(run: EnsembleRun, present: Float64Array, first: number, last: number, t: number): void {
  const { width, starts, onStep } = run;
  for (let path = first; path < last; path++) {
    const state = present.subarray(path * width, (path + 1) * width);
    if (Number.isNaN(state[0]!)) continue;
    onStep!(path, state, rowOf(starts.parameters, path, starts.size), t);
  }
}

function report(
  { run, scatter }: Moves,
  present: Float64Array,
  first: number,
  last: number,
  reported: readonly Float64Array[],
  block: number,
): void {
  const { width, states } = run;
  for (let s = 0; s < states; s++) {
    const column = reported[s]!;
    if (width === 1) column.set(present.subarray(first, last), first);
    else for (let path = first; path < last; path++) column[path] = present[path * width + s]!;
    const draw = run.reading[s];
    if (draw !== undefined) scatter(draw, column, first, 1, last - first, block);
  }
}
