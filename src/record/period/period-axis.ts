import { type Column, type ColumnTable, columnNamed, isEmpty } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import type { StepLength } from "../observations.js";
import { optionWrong } from "../refusals.js";
import { type Calendar, type CalendarName, calendarNamed, calendarNames, everyUnit } from "./calendar.js";
import { type Moment, momentOf } from "./calendar-date.js";
import { ambiguousDate, noPeriod, noSuchPeriod, stepMissing } from "./refusals.js";
import { suggestedStep } from "./suggested-step.js";

/** Where the rows of a record lie on its axis of periods. */
export interface PeriodAxis {
  /** The period column, or "year, week" for a pair. */
  readonly column: string;
  readonly calendar: Calendar;
  /** In steps from a fixed origin, one a row; whole numbers when rows lie on the step. */
  readonly position: Float64Array;
  /** In `calendar.step.of`: as read where the column holds numbers, else from the earliest row. */
  readonly time: Float64Array;
  /** Moments where the column holds dates. */
  readonly moments: Float64Array | undefined;
  /** The period of a row as it was written. */
  readonly written: (row: number) => string;
  /** Whether `written` says more than `time`: the column holds dates, or there is a pair of columns. */
  readonly isDated: boolean;
}

/**
 * Puts the rows of a record on the axis of periods.
 *
 * @throws {ModelError} `step-missing` | `option-wrong` | `no-period` | `ambiguous-date` | `no-such-period`.
 */
export function periodAxis(
  table: ColumnTable,
  period: string | readonly [string, string],
  step: StepLength | CalendarName | undefined,
): PeriodAxis {
  if (typeof period !== "string") return axisOfPair(table, period, calendarOf(step));
  const column = columnNamed(table, period, "the period");
  if (step === undefined) throw stepMissing(period, ...suggestedStep(column, period, holdsDates(column)));
  const calendar = calendarOf(step);
  return holdsDates(column) ? axisOfDates(column, period, calendar) : axisOfNumbers(column, period, calendar);
}

function calendarOf(step: StepLength | CalendarName | undefined): Calendar {
  if (typeof step === "object" && step.every > 0 && typeof step.of === "string") return everyUnit(step);
  const found = typeof step === "string" ? calendarNamed(step) : undefined;
  if (found === undefined)
    throw optionWrong(
      "step",
      step,
      `a length such as { every: 12, of: "hour" } or one of ${calendarNames.join(", ")}`,
    );
  return found;
}

/** Text that is not plainly a number is taken for a date; whether it is one is asked row by row. */
function holdsDates(column: Column): boolean {
  if (column instanceof Float64Array) return false;
  const first = column.find((cell) => !isEmpty(cell));
  return first instanceof Date || (typeof first === "string" && Number.isNaN(Number(first)));
}

function axisOfNumbers(column: Column, name: string, calendar: Calendar): PeriodAxis {
  const { values } = numberColumn(column, name);
  for (let row = 0; row < values.length; row++) if (Number.isNaN(values[row])) throw noPeriod(row + 1, name);
  const position = calendar.step.every === 1 ? values : values.map((value) => value / calendar.step.every);
  const written = (row: number): string => String(column[row]);
  return { column: name, calendar, position, time: values, moments: undefined, written, isDated: false };
}

function axisOfDates(column: Column, name: string, calendar: Calendar): PeriodAxis {
  if (calendar.ofDate === undefined)
    throw optionWrong(
      "period",
      name,
      `a column of numbers, or a pair of columns such as ["year", "period"], for this step`,
    );
  const moments = new Float64Array(column.length);
  for (let row = 0; row < column.length; row++) moments[row] = momentAt(column[row], row, name);
  const position = moments.map(calendar.ofDate);
  const written = (row: number): string => dateText(column[row]);
  return {
    column: name,
    calendar,
    position,
    time: fromEarliest(position, calendar),
    moments,
    written,
    isDated: true,
  };
}

function momentAt(cell: unknown, row: number, name: string): Moment {
  if (isEmpty(cell)) throw noPeriod(row + 1, name);
  const moment = momentOf(cell);
  if (moment === undefined) throw ambiguousDate(row + 1, name, cell);
  return moment;
}

function axisOfPair(table: ColumnTable, pair: readonly [string, string], calendar: Calendar): PeriodAxis {
  const number = calendar.ofYearAndNumber;
  if (number === undefined)
    throw optionWrong(
      "step",
      calendar.step.of,
      'one that a year numbers, such as "iso-week", "month" or "4-4-5"',
    );
  const [years, numbers] = pair.map(
    (name) => numberColumn(columnNamed(table, name, "the period"), name).values,
  );
  const position = new Float64Array(years!.length);
  for (let row = 0; row < position.length; row++) {
    if (Number.isNaN(years![row]! + numbers![row]!)) throw noPeriod(row + 1, pair.join(", "));
    const found = number(years![row]!, numbers![row]!);
    if (found === undefined) throw noSuchPeriod(row + 1, pair, years![row]!, numbers![row]!);
    position[row] = found;
  }
  const written = (row: number): string => `${years![row]}, ${numbers![row]}`;
  const time = fromEarliest(position, calendar);
  return { column: pair.join(", "), calendar, position, time, moments: undefined, written, isDated: true };
}

function fromEarliest(position: Float64Array, calendar: Calendar): Float64Array {
  const earliest = position.reduce((a, b) => Math.min(a, b), Number.POSITIVE_INFINITY);
  return position.map((at) => (at - earliest) * calendar.step.every);
}

function dateText(cell: unknown): string {
  return cell instanceof Date ? cell.toISOString().slice(0, 16).replace("T", " ") : String(cell);
}
