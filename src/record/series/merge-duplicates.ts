import type { FindingLog } from "../finding-log.js";
import type { DuplicateChoice } from "../observation-options.js";
import type { ReplicateVariation } from "../observations.js";
import type { PeriodAxis } from "../period/period-axis.js";
import type { ReadColumns } from "../read-columns.js";
import { pick } from "./pick.js";
import { duplicatePeriod } from "./refusals.js";

/** Rows of a series with one row a period, and how a column is carried over to them. */
export interface MergedRows {
  /** 0-based: the row that stands for each period. */
  readonly rows: Int32Array;
  /** Rows that the values come from. */
  readonly used: number;
  readonly carry: (column: Float64Array) => Float64Array;
  readonly carrySide: (side: Int8Array) => Int8Array;
  readonly spread: ((column: Float64Array) => ReplicateVariation) | undefined;
}

/** What to do with the rows of one period: by the choice for duplicates, or as technical replicates. */
export type Merging = DuplicateChoice | "replicates";

/**
 * Makes one row a period of rows in order.
 *
 * @throws {ModelError} `duplicate-period` unless the analyst chose what to do.
 */
export function mergeDuplicates(
  rows: Int32Array,
  group: string,
  columns: ReadColumns,
  axis: PeriodAxis,
  merging: Merging,
  log: FindingLog,
): MergedRows {
  if (!hasDoubles(rows, axis.position)) return unmerged(rows);
  const starts = startsOfPeriods(rows, axis.position);
  const runs = Array.from(starts, (start, i) => rows.subarray(start, starts[i + 1] ?? rows.length));
  const doubled = runs.filter((run) => run.length > 1);
  if (merging === "refuse") throw refusal(doubled, group, columns, axis);
  if (merging !== "replicates") for (const run of doubled) noteDuplicate(run, columns, axis, merging, log);
  const stands =
    merging === "last" ? (run: Int32Array) => run[run.length - 1]! : (run: Int32Array) => run[0]!;
  return {
    rows: Int32Array.from(runs, stands),
    used: merging === "first" || merging === "last" ? runs.length : rows.length,
    carry: (column) => Float64Array.from(runs, (run) => combine(run, column, merging)),
    carrySide: (side) => Int8Array.from(runs, (run) => sideOf(run, side, merging)),
    spread: merging === "replicates" ? (column) => spreadOf(runs, column) : undefined,
  };
}

/** Positions are in steps: closer than a millionth of a step is the same period. */
const same = 1e-6;

function hasDoubles(rows: Int32Array, position: Float64Array): boolean {
  for (let i = 1; i < rows.length; i++)
    if (position[rows[i]!]! - position[rows[i - 1]!]! <= same) return true;
  return false;
}

function startsOfPeriods(rows: Int32Array, position: Float64Array): Int32Array {
  return Int32Array.from(rows.keys()).filter(
    (i) => i === 0 || position[rows[i]!]! - position[rows[i - 1]!]! > same,
  );
}

function unmerged(rows: Int32Array): MergedRows {
  const carry = (column: Float64Array): Float64Array => pick(column, rows);
  const carrySide = (side: Int8Array): Int8Array => Int8Array.from(rows, (row) => side[row]!);
  return { rows, used: rows.length, carry, carrySide, spread: undefined };
}

function combine(run: Int32Array, column: Float64Array, merging: Merging): number {
  if (merging === "first") return column[run[0]!]!;
  if (merging === "last") return column[run[run.length - 1]!]!;
  let sum = 0;
  for (const row of run) sum += column[row]!;
  return merging === "sum" ? sum : sum / run.length;
}

/** A mean of a limit and values lies on the limit's side of the mean with the limit put in. */
function sideOf(run: Int32Array, side: Int8Array, merging: Merging): number {
  if (merging === "first") return side[run[0]!]!;
  if (merging === "last") return side[run[run.length - 1]!]!;
  return Math.sign(run.reduce((sum, row) => sum + side[row]!, 0));
}

function spreadOf(runs: readonly Int32Array[], column: Float64Array): ReplicateVariation {
  const count = Int32Array.from(runs, (run) => run.length);
  const deviation = Float64Array.from(runs, (run) => {
    const mean = combine(run, column, "average");
    const squares = run.reduce((sum, row) => sum + (column[row]! - mean) ** 2, 0);
    return run.length > 1 ? Math.sqrt(squares / (run.length - 1)) : Number.NaN;
  });
  return { count, deviation };
}

function valuesOf(run: Int32Array, columns: ReadColumns): string[] {
  return Array.from(run, (row) => columns.values.map((values) => values[row]!).join(" / "));
}

function refusal(
  doubled: readonly Int32Array[],
  group: string,
  columns: ReadColumns,
  axis: PeriodAxis,
): Error {
  const run = doubled[0]!;
  const facts = {
    rows: Array.from(run, (row) => row + 1),
    column: axis.column,
    group,
    period: axis.written(run[0]!),
    values: valuesOf(run, columns),
  };
  return duplicatePeriod(facts, doubled.length - 1);
}

const doneFor = {
  average: "averaged",
  sum: "added up",
  first: "the first kept",
  last: "the last kept",
  refuse: "",
};

function noteDuplicate(
  run: Int32Array,
  columns: ReadColumns,
  axis: PeriodAxis,
  merging: DuplicateChoice,
  log: FindingLog,
): void {
  const rows = Array.from(run, (row) => row + 1).join(" and ");
  const values = valuesOf(run, columns);
  const alike = new Set(values).size === 1 ? "the same value" : "different values";
  log.note({
    kind: "duplicate-period",
    row: run[1]! + 1,
    column: axis.column,
    value: values.join(", "),
    message: `${axis.column} ${axis.written(run[0]!)} appears ${run.length} times, at rows ${rows}, with ${alike} (${values.join(", ")}).`,
    done: doneFor[merging],
  });
  columns.states.forEach(({ column }, state) => {
    const cells = columns.values[state]!;
    const was = Array.from(run, (row) => cells[row]!).join(", ");
    const now = combine(run, cells, merging);
    log.decide({
      row: run[0]! + 1,
      column,
      was,
      now,
      why: `rows ${rows} are of one period; duplicates: "${merging}"`,
      who: "",
    });
  });
}
