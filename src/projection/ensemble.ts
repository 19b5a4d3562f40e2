import { type NoiseStream, noiseStream } from "../dynamics/index.js";
import { type RandomStream, randomStream } from "../numeric/index.js";
import type { CompiledRule } from "../rule/index.js";
import type { NoiseDraw, NoiseLot } from "./noise.js";

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
  const scatter = scatterer(run);
  const advance = stepper(run);
  for (let t = 0; t <= periods; t++) {
    for (let block = 0; block * blockSize < paths; block++) {
      const first = block * blockSize;
      const last = Math.min(first + blockSize, paths);
      if (t > 0) {
        if (run.onStep !== undefined) tellSteps(run, present, first, last, run.from + t - 1);
        advance(present, first, last, run.from + t - 1);
        run.change.forEach((draw, s) => {
          if (draw !== undefined) scatter(draw, present, first * width + s, width, last - first, block);
        });
        endOutside(run, present, first, last);
      }
      report(run, present, first, last, reported);
      run.reading.forEach((draw, s) => {
        if (draw !== undefined) scatter(draw, reported[s]!, first, 1, last - first, block);
      });
      run.onProgress?.(t * paths + last, (periods + 1) * paths);
    }
    run.onRow(t, reported);
  }
}

function rowOf(rows: Float64Array, path: number, width: number): Float64Array {
  return rows.length === width ? rows : rows.subarray(path * width, (path + 1) * width);
}

type Advance = (present: Float64Array, first: number, last: number, t: number) => void;

/** One period of a block of paths by the rule. */
function stepper(run: EnsembleRun): Advance {
  const { compiled, inputs, starts } = run;
  const { size, constants } = starts;
  const advance = constants.length === size ? compiled.advance : compiled.advanceEach;
  return (present, first, last, t) => {
    advance(present, first, last, constants, inputs, t);
  };
}

/** Tells of the steps that a block is about to take; ended paths take none. */
function tellSteps(run: EnsembleRun, present: Float64Array, first: number, last: number, t: number): void {
  const { width, starts, onStep } = run;
  for (let path = first; path < last; path++) {
    const state = present.subarray(path * width, (path + 1) * width);
    if (Number.isNaN(state[0]!)) continue;
    onStep!(path, state, rowOf(starts.constants, path, starts.size), t);
  }
}

/** Scatters `count` values that stand `apart` places from each other; ended ones stay as they are. */
type Scatter = (
  draw: NoiseDraw,
  values: Float64Array,
  from: number,
  apart: number,
  count: number,
  block: number,
) => void;

/** Normal errors come by the lot, all others one by one. */
function scatterer({ streams, change, reading }: EnsembleRun): Scatter {
  const byLot = [...change, ...reading].some((draw) => draw?.lot !== undefined);
  const lots = byLot ? streams.map((stream) => noiseStream(Math.floor(stream.uniform() * 2 ** 53))) : [];
  return (draw, values, from, apart, count, block) => {
    if (draw.lot === undefined) scatterEach(draw, values, from, apart, count, streams[block]!);
    else scatterLot(draw.lot, values, from, apart, count, lots[block]!);
  };
}

function scatterLot(
  { kind, centre, sd }: NoiseLot,
  values: Float64Array,
  from: number,
  apart: number,
  count: number,
  stream: NoiseStream,
): void {
  if (kind === "factors") {
    const factors = stream.factors(count, centre, sd);
    for (let i = 0, at = from; i < count; i++, at += apart) values[at]! *= factors[i]!;
    return;
  }
  const normals = stream.normals(count);
  for (let i = 0, at = from; i < count; i++, at += apart) values[at]! += sd * normals[i]!;
}

function scatterEach(
  draw: NoiseDraw,
  values: Float64Array,
  from: number,
  apart: number,
  count: number,
  stream: RandomStream,
): void {
  for (let i = 0, at = from; i < count; i++, at += apart) {
    const value = values[at]!;
    if (!Number.isNaN(value)) values[at] = draw(value, stream);
  }
}

/** Ends the paths of which a state lies out of range: all their values are NaN from there on. */
function endOutside(run: EnsembleRun, present: Float64Array, first: number, last: number): void {
  const { width, states, limits } = run;
  for (let s = 0; s < states; s++) {
    const low = Math.max(limits[s]![0], -Number.MAX_VALUE);
    const high = Math.min(limits[s]![1], Number.MAX_VALUE);
    for (let at = first * width + s; at < last * width; at += width) {
      const value = present[at]!;
      if (!(value >= low && value <= high)) present.fill(Number.NaN, at - s, at - s + width);
    }
  }
}

function report(
  { width, states }: EnsembleRun,
  present: Float64Array,
  first: number,
  last: number,
  reported: readonly Float64Array[],
): void {
  for (let s = 0; s < states; s++) {
    const column = reported[s]!;
    for (let path = first; path < last; path++) column[path] = present[path * width + s]!;
  }
}
