import { type ColumnTable, columnNamed } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import type { Measured } from "../observation-options.js";
import type { StepLength } from "../observations.js";
import { type CalendarName, numberOfMoment } from "../period/calendar.js";
import { type PlacedRows, placedRows } from "../period/placed-rows.js";
import { optionMissing, optionWrong } from "../refusals.js";
import { tableOfRows } from "../table-of-rows.js";
import { type PeriodsOf, type PlacedSeries, placed } from "./placed-series.js";
import { type Summary, summaryOf } from "./summary-of.js";

/** Which longer period to count by, and how each column is taken over it. */
export interface ToPeriodsOptions extends PeriodsOf {
  /** Length of the longer periods, or their calendar. */
  readonly to: StepLength | CalendarName;
  /** By column, how its values become one. */
  readonly take?: Readonly<Record<string, Summary>>;
  /** By column, what it is: of a level the last value is taken, of a flow the sum. */
  readonly measured?: Readonly<Record<string, Measured>>;
}

/**
 * A table with one row a longer period: days become months, weeks become quarters. A period in which a value or a
 * row is missing has none: a part of a month is not a month. The column "rows" counts the recorded rows of each
 * period, so that one begun before the record or broken off by its end shows.
 *
 * @throws {ModelError} `missing-column` | `not-a-number` | `option-wrong`, and those of the period column.
 */
export function toPeriods(record: ColumnTable, options: ToPeriodsOptions): ColumnTable {
  const { table, periods, by, series } = placed(record, options);
  const longer = placedRows(table, options.period, options.to);
  const { of } = periods.calendar.step;
  if (periods.moments === undefined && longer.calendar.step.of !== of)
    throw optionWrong("to", options.to, `a number of ${of}, because the periods are numbers and not dates`);
  const taken = Object.entries(summariesOf(options)).map(([name, take]) => ({
    name,
    summary: summaryOf(take),
    values: numberColumn(columnNamed(table, name, "a column to take over"), name).values,
  }));
  const rows = series.flatMap((own) => {
    const broken = brokenPeriods(own, longer);
    return Array.from(rowsByPeriod(own, longer), ([period, inside]) => ({
      ...Object.fromEntries(by.map((name) => [name, columnNamed(table, name, "a series")[inside[0]!]])),
      [periods.column]:
        periods.moments === undefined ? periods.time[inside[0]!] : periods.written(inside[0]!),
      ...Object.fromEntries(
        taken.map(({ name, summary, values }) => [
          name,
          broken.has(period) ? Number.NaN : whole(inside, values, summary),
        ]),
      ),
      rows: inside.length,
    }));
  });
  return tableOfRows(rows);
}

/** What is taken of each column: stated, or by what the column is. */
function summariesOf({ take = {}, measured = {} }: ToPeriodsOptions): Readonly<Record<string, Summary>> {
  const byKind = Object.entries(measured).map(([name, kind]): [string, Summary] => {
    if (kind !== "level" && kind !== "flow") throw optionWrong("measured", kind, "one of level, flow");
    return [name, kind === "flow" ? "sum" : "last"];
  });
  if (byKind.length + Object.keys(take).length === 0)
    throw optionMissing(
      "take",
      'Say what becomes of each column: measured: { paid: "flow", owed: "level" }.',
    );
  return { ...Object.fromEntries(byKind), ...take };
}

function rowsByPeriod({ rows }: PlacedSeries, longer: PlacedRows): ReadonlyMap<number, readonly number[]> {
  const inside = new Map<number, number[]>();
  for (const row of rows) {
    const period = Math.floor(longer.position[row]!);
    inside.set(period, [...(inside.get(period) ?? []), row]);
  }
  return inside;
}

/** Longer periods in which a row of the series is missing: its moment lies evenly between its neighbours'. */
function brokenPeriods({ rows, index }: PlacedSeries, longer: PlacedRows): ReadonlySet<number> {
  const broken = new Set<number>();
  const { moments, calendar, position } = longer;
  for (let i = 1; i < rows.length; i++) {
    const [before, after, steps] = [rows[i - 1]!, rows[i]!, index[i]! - index[i - 1]!];
    for (let step = 1; step < steps; step++) {
      const between = (of: Float64Array): number => of[before]! + ((of[after]! - of[before]!) * step) / steps;
      const at = moments ? numberOfMoment(calendar, between(moments))! : between(position);
      broken.add(Math.floor(at));
    }
  }
  return broken;
}

function whole(
  rows: readonly number[],
  values: Float64Array,
  summary: (values: readonly number[]) => number,
): number {
  const inside = rows.map((row) => values[row]!);
  return inside.some(Number.isNaN) ? Number.NaN : summary(inside);
}
