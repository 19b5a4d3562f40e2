import { type ColumnTable, columnNamed, rowCount } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import { optionWrong } from "../refusals.js";
import { type PeriodsOf, type PlacedSeries, placed } from "./placed-series.js";
import { type Summary, summaryOf } from "./summary-of.js";
import { withColumn } from "./with-column.js";

/** Which window to summarise, and how. */
export interface WindowOptions extends PeriodsOf {
  /** Column to summarise. */
  readonly column: string;
  /** Periods in the window, this one included. */
  readonly over?: number;
  /** What is taken of the values in a window. */
  readonly take: Summary;
  /** Fewest values a window needs; default every period of it (one, in a window from the first row on). */
  readonly needed?: number;
  /** Name of the new column; default "mean of sold over 4". */
  readonly name?: string;
}

/**
 * Adds a summary of the last periods of a column at each row. The window counts periods, not rows: where one of
 * them is missing the summary is missing too, unless fewer values are said to do.
 *
 * @throws {ModelError} `option-wrong` | `missing-column` | `not-a-number`, and those of the period column.
 */
export function windowed(record: ColumnTable, options: WindowOptions): ColumnTable {
  const { column, over, take, needed = over ?? 1 } = options;
  if (over !== undefined && !(Number.isInteger(over) && over >= 1))
    throw optionWrong("over", over, "a whole number of periods, at least 1");
  const { name = `${take} of ${column}${over === undefined ? " so far" : ` over ${over}`}` } = options;
  const summary = summaryOf(take);
  const { table, series } = placed(record, options);
  const { values } = numberColumn(columnNamed(table, column, "the column to summarise"), column);
  const made = new Float64Array(rowCount(table)).fill(Number.NaN);
  for (const one of series)
    summariseWindows(one, values, { over, needed: Math.max(1, needed), summary }, made);
  return withColumn(record, name, made);
}

interface Window {
  readonly over: number | undefined;
  readonly needed: number;
  readonly summary: (values: readonly number[]) => number;
}

function summariseWindows(
  { rows, index }: PlacedSeries,
  values: Float64Array,
  { over, needed, summary }: Window,
  made: Float64Array,
): void {
  let first = 0;
  for (let i = 0; i < rows.length; i++) {
    while (over !== undefined && index[first]! <= index[i]! - over) first++;
    const window = Array.from(rows.subarray(first, i + 1), (row) => values[row]!);
    const inside = window.filter((value) => !Number.isNaN(value));
    if (inside.length >= needed) made[rows[i]!] = summary(inside);
  }
}
