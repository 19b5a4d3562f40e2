import type { FindingLog } from "../finding-log.js";
import type { DuplicateChoice } from "../observation-options.js";
import type { ReplicateVariation } from "../observations.js";
import { rounding } from "../period/period-axis.js";
import type { PlacedRows } from "../period/placed-rows.js";
import type { ReadColumn, ReadColumns } from "../read-columns.js";
import { noteDuplicate, valuesOf } from "./note-duplicate.js";
import { pick } from "./pick.js";
import { duplicatePeriod } from "./refusals.js";

/** What to do with the cells of one period: by the choice for duplicates, or as technical replicates. */
export type Merging = DuplicateChoice | "replicates";

/** A column with one cell a period; NaN where the period has none. */
export type Carry = (values: Float64Array, how: DuplicateChoice) => Float64Array;

/** Rows of a series with one row a period, and how a column is carried over to them. */
export interface MergedRows {
  /** 0-based: the row that stands for each period. */
  readonly rows: Int32Array;
  /** How many rows of the record each of them holds. */
  readonly held: Int32Array;
  readonly carry: Carry;
  readonly carrySide: (side: Int8Array, state: ReadColumn) => Int8Array;
  /** Only where replicates are averaged. */
  readonly variation: ((values: Float64Array) => ReplicateVariation) | undefined;
}

/**
 * Makes one row a period of rows in order. Empty cells count for nothing: what one row lacks another may have.
 *
 * @throws {ModelError} `duplicate-period` where a column has several cells in a period, unless the analyst chose what to do.
 */
export function mergePeriods(
  rows: Int32Array,
  group: string,
  columns: ReadColumns,
  periods: PlacedRows,
  areReplicates: boolean,
  log: FindingLog,
): MergedRows {
  if (!hasDoubles(rows, periods.position)) return unmerged(rows);
  const runs = runsOf(rows, periods.position);
  if (!areReplicates) settleDoubles(runs, group, columns, periods, log);
  const all = [...columns.states, ...columns.inputs];
  const [first] = columns.states;
  const keepsOne = !areReplicates && all.every(({ doubled }) => doubled === "first" || doubled === "last");
  const merging = (how: DuplicateChoice): Merging => (areReplicates ? "replicates" : how);
  return {
    rows: Int32Array.from(runs, (run) => {
      const own = cellsIn(run, first!.values);
      return (first!.doubled === "last" ? own.at(-1) : own[0]) ?? run[0]!;
    }),
    held: Int32Array.from(runs, (run) => (keepsOne ? 1 : run.length)),
    carry: (values, how) => Float64Array.from(runs, (run) => combined(run, values, merging(how))),
    carrySide: (side, { values, doubled }) =>
      Int8Array.from(runs, (run) => sideOf(cellsIn(run, values), side, merging(doubled))),
    variation: areReplicates ? (values) => variationOf(runs, values) : undefined,
  };
}

/** Positions are in steps: closer than a millionth of one is the same period. */
function hasDoubles(rows: Int32Array, position: Float64Array): boolean {
  for (let i = 1; i < rows.length; i++)
    if (position[rows[i]!]! - position[rows[i - 1]!]! <= rounding) return true;
  return false;
}

function unmerged(rows: Int32Array): MergedRows {
  return {
    rows,
    held: new Int32Array(rows.length).fill(1),
    carry: (values) => pick(values, rows),
    carrySide: (side) => Int8Array.from(rows, (row) => side[row]!),
    variation: undefined,
  };
}

/** Rows of each period. */
function runsOf(rows: Int32Array, position: Float64Array): readonly Int32Array[] {
  const starts: number[] = [];
  for (let i = 0; i < rows.length; i++)
    if (i === 0 || position[rows[i]!]! - position[rows[i - 1]!]! > rounding) starts.push(i);
  return starts.map((start, i) => rows.subarray(start, starts[i + 1] ?? rows.length));
}

function settleDoubles(
  runs: readonly Int32Array[],
  group: string,
  columns: ReadColumns,
  periods: PlacedRows,
  log: FindingLog,
): void {
  const all = [...columns.states, ...columns.inputs];
  const isDouble = (run: Int32Array, { values }: ReadColumn): boolean => cellsIn(run, values).length > 1;
  const doubled = runs.filter((run) => run.length > 1 && all.some((column) => isDouble(run, column)));
  const refused = doubled.filter((run) =>
    all.some((column) => column.doubled === "refuse" && isDouble(run, column)),
  );
  if (refused.length > 0) throw refusal(refused, group, columns, periods);
  for (const run of doubled)
    noteDuplicate(
      run,
      all
        .filter((column) => isDouble(run, column))
        .map((column) => ({ column, now: combined(run, column.values, column.doubled) })),
      columns,
      periods,
      log,
    );
}

function cellsIn(run: Int32Array, values: Float64Array): Int32Array {
  return run.length === 1 && !Number.isNaN(values[run[0]!]!)
    ? run
    : run.filter((row) => !Number.isNaN(values[row]!));
}

function combined(run: Int32Array, values: Float64Array, how: Merging): number {
  const cells = cellsIn(run, values);
  if (cells.length < 2) return cells.length === 0 ? Number.NaN : values[cells[0]!]!;
  if (how === "first") return values[cells[0]!]!;
  if (how === "last") return values[cells[cells.length - 1]!]!;
  let sum = 0;
  for (const row of cells) sum += values[row]!;
  return how === "sum" ? sum : sum / cells.length;
}

/** A mean of a limit and values lies on the limit's side of the mean with the limit put in. */
function sideOf(cells: Int32Array, side: Int8Array, how: Merging): number {
  if (how === "first") return side[cells[0]!] ?? 0;
  if (how === "last") return side[cells[cells.length - 1]!] ?? 0;
  return Math.sign(cells.reduce((sum, row) => sum + side[row]!, 0));
}

function variationOf(runs: readonly Int32Array[], values: Float64Array): ReplicateVariation {
  const cells = runs.map((run) => cellsIn(run, values));
  return {
    count: Int32Array.from(cells, (run) => run.length),
    deviation: Float64Array.from(cells, (run) => {
      const mean = combined(run, values, "average");
      const squares = run.reduce((sum, row) => sum + (values[row]! - mean) ** 2, 0);
      return run.length > 1 ? Math.sqrt(squares / (run.length - 1)) : Number.NaN;
    }),
  };
}

function refusal(
  doubled: readonly Int32Array[],
  group: string,
  columns: ReadColumns,
  periods: PlacedRows,
): Error {
  const run = doubled[0]!;
  const facts = {
    rows: Array.from(run, (row) => row + 1),
    column: periods.column,
    group,
    period: periods.written(run[0]!),
    values: valuesOf(run, columns),
  };
  return duplicatePeriod(facts, doubled.length - 1);
}
