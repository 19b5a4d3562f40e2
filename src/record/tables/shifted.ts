import { type ColumnTable, columnNamed, rowCount } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import { optionWrong } from "../refusals.js";
import { type PeriodsOf, placed } from "./placed-series.js";
import { withColumn } from "./with-column.js";

/** What to shift. */
export interface ShiftOptions extends PeriodsOf {
  /** Column to shift. */
  readonly column: string;
  /** Periods back, or with a minus ahead; default 1. */
  readonly steps?: number;
  /** Name of the new column; default "owed, 1 before". */
  readonly name?: string;
}

/**
 * Adds the value of a column some periods before (or after) each row. Where no row stands there, the cell is
 * missing: a gap is not closed up.
 *
 * @throws {ModelError} `option-wrong` | `missing-column` | `not-a-number`, and those of the period column.
 */
export function shifted(record: ColumnTable, options: ShiftOptions): ColumnTable {
  const {
    column,
    steps = 1,
    name = `${column}, ${Math.abs(steps)} ${steps < 0 ? "after" : "before"}`,
  } = options;
  if (!Number.isInteger(steps)) throw optionWrong("steps", steps, "a whole number of periods");
  const { table, series } = placed(record, options);
  const { values } = numberColumn(columnNamed(table, column, "the column to shift"), column);
  const moved = new Float64Array(rowCount(table)).fill(Number.NaN);
  for (const { rows, index } of series) {
    const rowAt = new Map(Array.from(index, (step, i) => [step, rows[i]!]));
    index.forEach((step, i) => {
      const from = rowAt.get(step - steps);
      if (from !== undefined) moved[rows[i]!] = values[from]!;
    });
  }
  return withColumn(record, name, moved);
}
