import { type RandomStream, randomStream } from "../numeric/index.js";
import type { CompiledRule } from "../rule/index.js";
import type { NoiseDraw } from "./noise.js";

/** Where every path of an ensemble begins: its constants and its state vector, one row a path. */
export interface Starts {
  readonly paths: number;
  /** How many constants the rule has. */
  readonly size: number;
  /** [paths, size], or [1, size] where all paths share them. */
  readonly constants: Float64Array;
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
  /** One a block of paths; see `blockStreams`. */
  readonly streams: readonly RandomStream[];
  /** Told of every step before it is taken: the path, its state vector and constants, and the absolute period. */
  readonly onStep?: (path: number, state: Float64Array, constants: Float64Array, t: number) => void;
  /** Takes the values of all paths at row `t`, [states][paths]; NaN where a path has ended. Not to be kept. */
  readonly onRow: (t: number, values: readonly Float64Array[]) => void;
  /** Called after every block of a period; what it throws ends the run. */
  readonly onProgress?: (done: number, of: number) => void;
}

/** Paths that share a stream. More paths leave the earlier whole blocks as they are; more periods leave all. */
export const blockSize = 1024;

/** One stream a block of paths, seeded from the given one. */
export function blockStreams(stream: RandomStream, paths: number): readonly RandomStream[] {
  const blocks = Math.ceil(paths / blockSize);
  return Array.from({ length: blocks }, () => randomStream(Math.floor(stream.uniform() * 2 ** 53)));
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
  const reported = Array.from({ length: states }, () => new Float64Array(paths));
  const advance = stepper(run);
  for (let t = 0; t <= periods; t++) {
    for (let block = 0; block * blockSize < paths; block++) {
      const first = block * blockSize;
      const last = Math.min(first + blockSize, paths);
      if (t > 0) advance(present, first, last, run.from + t - 1, run.streams[block]!);
      report(run, present, first, last, reported, run.streams[block]!);
      run.onProgress?.(t * paths + last, (periods + 1) * paths);
    }
    run.onRow(t, reported);
  }
}

function rowOf(rows: Float64Array, path: number, width: number): Float64Array {
  return rows.length === width ? rows : rows.subarray(path * width, (path + 1) * width);
}

type Advance = (present: Float64Array, first: number, last: number, t: number, stream: RandomStream) => void;

/** One period of a block of paths: the rule, then its random change, then the look at the limits. */
function stepper(run: EnsembleRun): Advance {
  const { compiled, width, inputs, starts } = run;
  const { size } = starts;
  const shared = starts.constants.length === size;
  const constants = starts.constants.slice(0, size);
  const state = new Float64Array(width);
  const changed = changer(run, state);
  return (present, first, last, t, stream) => {
    for (let path = first; path < last; path++) {
      const base = path * width;
      if (Number.isNaN(present[base]!)) continue;
      copy(present, base, state, 0, width);
      if (!shared) copy(starts.constants, path * size, constants, 0, size);
      run.onStep?.(path, state, constants, t);
      compiled.step(state, constants, inputs, t, state);
      if (changed(stream)) copy(state, 0, present, base, width);
      else present.fill(Number.NaN, base, base + width);
    }
  };
}

/** Short copies in a plain loop: a call of `set` costs more than the few numbers that it moves. */
function copy(from: Float64Array, at: number, to: Float64Array, place: number, count: number): void {
  for (let i = 0; i < count; i++) to[place + i] = from[at + i]!;
}

/** Puts the random change on a state vector; false where a state then lies out of range. */
function changer(run: EnsembleRun, state: Float64Array): (stream: RandomStream) => boolean {
  const { change, limits, states } = run;
  const random = change.some((draw) => draw !== undefined);
  return (stream) => {
    for (let s = 0; random && s < states; s++) {
      const draw = change[s];
      if (draw !== undefined) state[s] = draw(state[s]!, stream);
    }
    return within(state, states, limits);
  };
}

function within(state: Float64Array, states: number, limits: EnsembleRun["limits"]): boolean {
  for (let s = 0; s < states; s++) {
    const value = state[s]!;
    const [low, high] = limits[s]!;
    if (!(value >= low && value <= high && Number.isFinite(value))) return false;
  }
  return true;
}

function report(
  run: EnsembleRun,
  present: Float64Array,
  first: number,
  last: number,
  reported: readonly Float64Array[],
  stream: RandomStream,
): void {
  const { width } = run;
  for (let s = 0; s < run.states; s++) {
    const column = reported[s]!;
    const read = run.reading[s];
    for (let path = first; path < last; path++) {
      const value = present[path * width + s]!;
      column[path] = read === undefined || Number.isNaN(value) ? value : read(value, stream);
    }
  }
}
