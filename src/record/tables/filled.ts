import { type Column, type ColumnTable, columnNamed, isEmpty } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import { packed } from "../packed.js";
import { axisOfRows } from "../period/axis-of-rows.js";
import { labelAt } from "../period/period-axis.js";
import type { PlacedRows } from "../period/placed-rows.js";
import { optionWrong } from "../refusals.js";
import { type PeriodsOf, type PlacedSeries, type PlacedTable, placed } from "./placed-series.js";

/** How a missing value is filled: the one before it, a line between its neighbours, or a number. */
export type FillRule = "previous" | "between" | number;

/** What to fill, and by which rule. */
export interface FillOptions extends PeriodsOf {
  /** Column to fill. */
  readonly column: string;
  /** Value of an empty cell: the one before, a line between its neighbours, or a number. */
  readonly with: FillRule;
}

/**
 * Gives a table a row for every period from first to last of each series, and fills the empty cells of one
 * column by the rule stated. A column "stock filled" says which cells were: nothing passes for recorded.
 *
 * Cells before the first and after the last recorded value are never filled by "previous" or "between" beyond
 * what these say. Other columns are empty in the new rows, except those that tell series and periods apart.
 *
 * @throws {ModelError} `option-wrong` (a pair of period columns names no missing period) |
 *   `missing-column` | `not-a-number`, and those of the period column.
 */
export function filled(record: ColumnTable, options: FillOptions): ColumnTable {
  const rule = options.with;
  if (rule !== "previous" && rule !== "between" && typeof rule !== "number")
    throw optionWrong("with", rule, '"previous", "between" or a number');
  const place = placed(record, options);
  const { values } = numberColumn(
    columnNamed(place.table, options.column, "the column to fill"),
    options.column,
  );
  if (typeof options.period !== "string")
    throw optionWrong(
      "period",
      place.periods.column,
      "a single column, so that the missing periods can be named",
    );
  const rows = place.series.flatMap((series) => everyPeriod(series, place.periods));
  const cells = place.series.flatMap((series) => filledSeries(series, values, rule));
  return assembled(place, options.column, rows, cells);
}

/** The row of each period of a series; where it has none, how the period is written, and the first row of the series. */
type PeriodRow = { readonly row: number } | { readonly first: number; readonly period: string | number };

function everyPeriod(series: PlacedSeries, periods: PlacedRows): PeriodRow[] {
  const { rows, index } = series;
  const rowAt = new Map(Array.from(index, (step, i) => [step, rows[i]!]));
  const axis = axisOfRows(periods, series);
  return Array.from({ length: index[index.length - 1]! + 1 }, (_, step) => {
    const row = rowAt.get(step);
    if (row !== undefined) return { row };
    const label = labelAt(axis, step);
    return { first: rows[0]!, period: axis.counts === "numbers" ? Number(label) : label };
  });
}

function filledSeries(
  { rows, index }: PlacedSeries,
  values: Float64Array,
  rule: FillRule,
): readonly FilledCell[] {
  const known = Array.from(index, (step, i): readonly [number, number] => [step, values[rows[i]!]!]).filter(
    ([, value]) => !Number.isNaN(value),
  );
  let next = 0;
  return Array.from({ length: index[index.length - 1]! + 1 }, (_, step) => {
    while (next < known.length && known[next]![0] < step) next++;
    const after = known[next];
    if (after?.[0] === step) return { value: after[1], was: true };
    return { value: fill(rule, step, known[next - 1], after), was: false };
  });
}

interface FilledCell {
  readonly value: number;
  /** Whether it was recorded. */
  readonly was: boolean;
}

/** Step and value of the recorded cell before and after an empty one. */
type Known = readonly [number, number] | undefined;

function fill(rule: FillRule, step: number, before: Known, after: Known): number {
  if (typeof rule === "number") return rule;
  if (before === undefined || (rule === "between" && after === undefined)) return Number.NaN;
  if (rule === "previous") return before[1];
  return before[1] + ((after![1] - before[1]) * (step - before[0])) / (after![0] - before[0]);
}

function assembled(
  { table, periods, by }: PlacedTable,
  column: string,
  rows: readonly PeriodRow[],
  cells: readonly FilledCell[],
): ColumnTable {
  const cellOf = (name: string, source: Column, at: PeriodRow, i: number): unknown => {
    if (name === column) return cells[i]!.value;
    if ("row" in at) return source[at.row];
    if (name === periods.column) return at.period;
    return by.includes(name) ? source[at.first] : null;
  };
  const columns = table.columns.map((source, c) =>
    packed(rows.map((at, i) => cellOf(table.names[c]!, source, at, i))),
  );
  const marks = cells.map(({ was, value }) => !was && !isEmpty(value));
  return { names: [...table.names, `${column} filled`], columns: [...columns, marks] };
}
