import { type CompiledRule, type StateBound, withinBound } from "../../rule/index.js";

/** A run of one path. */
export interface PathRun {
  readonly initial: Float64Array;
  readonly parameters: Float64Array;
  /** Other parameters that hold from a row on. */
  readonly ahead?: { readonly row: number; readonly parameters: Float64Array } | undefined;
  readonly inputs: readonly Float64Array[];
  /** Absolute period of the first value. */
  readonly from: number;
  readonly periods: number;
}

/** Where a path came to lie beyond a bound of a state, or was no longer finite. */
export interface BoundReached {
  readonly row: number;
  /** Its place among the states. */
  readonly state: number;
  /** What the rule gave there. */
  readonly value: number;
  /** Whether it stays at the bound from there on; else the path ends. */
  readonly absorbed: boolean;
}

/** A path within the bounds of its states. */
export interface BoundedPath {
  /** [periods + 1, width]; of rows from `rows` on nothing is meant. */
  readonly table: Float64Array;
  /** Rows that have a value. */
  readonly rows: number;
  readonly reached: readonly BoundReached[];
}

/**
 * Runs a rule once: a state that passes a bound that absorbs stays there, the others go on; where another bound is
 * passed, or a value is not finite, the path ends before that row.
 */
export function boundedPath(
  compiled: CompiledRule,
  bounds: readonly StateBound[],
  run: PathRun,
): BoundedPath {
  const width = run.initial.length;
  const rows = run.periods + 1;
  const table = freePath(compiled, run, rows, width);
  const held: (number | undefined)[] = bounds.map(() => undefined);
  const reached: BoundReached[] = [];
  for (let row = firstBeyond(table, bounds, width); row < rows; row++) {
    const state = table.subarray(row * width, (row + 1) * width);
    if (reached.length > 0) stepTo(compiled, run, table, row, width);
    bounds.forEach((bound, s) => {
      const value = state[s]!;
      state[s] = held[s] ?? withinBound(bound, value);
      if (state[s] === value || held[s] !== undefined) return;
      const absorbed = Number.isFinite(state[s]);
      if (absorbed) held[s] = state[s];
      reached.push({ row, state: s, value, absorbed });
    });
    if (reached.some(({ absorbed }) => !absorbed)) return { table, rows: row, reached };
  }
  return { table, rows, reached };
}

/** First row with a value that is not within its bounds. */
function firstBeyond(table: Float64Array, bounds: readonly StateBound[], width: number): number {
  let first = table.length;
  bounds.forEach((bound, s) => {
    for (let at = s; at < first; at += width)
      if (withinBound(bound, table[at]!) !== table[at]) first = at - s;
  });
  return first / width;
}

/** The path as if there were no bounds. */
function freePath(compiled: CompiledRule, run: PathRun, rows: number, width: number): Float64Array {
  const { initial, parameters, inputs, from, periods, ahead } = run;
  const table = new Float64Array(rows * width);
  const first = Math.min(periods, ahead?.row ?? periods);
  compiled.path(initial, parameters, inputs, from, first, table);
  if (ahead !== undefined && first < periods) {
    const present = table.slice(first * width, (first + 1) * width);
    const later = table.subarray(first * width);
    compiled.path(present, ahead.parameters, inputs, from + first, periods - first, later);
  }
  return table;
}

/** Works a row out anew from the one before it, which a bound has changed. */
function stepTo(
  compiled: CompiledRule,
  { parameters, ahead, inputs, from }: PathRun,
  table: Float64Array,
  row: number,
  width: number,
): void {
  const before = table.subarray((row - 1) * width, row * width);
  const holding = ahead !== undefined && row > ahead.row ? ahead.parameters : parameters;
  compiled.step(before, holding, inputs, from + row - 1, table.subarray(row * width, (row + 1) * width));
}
