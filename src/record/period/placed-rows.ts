import { type Column, type ColumnTable, columnNamed, isEmpty } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import type { StepLength } from "../observations.js";
import { optionWrong } from "../refusals.js";
import {
  type Calendar,
  type CalendarName,
  calendarOf,
  isNumberedByYear,
  momentOfPair,
  noShift,
  numberOfMoment,
} from "./calendar.js";
import { type Moment, monthOf } from "./moment.js";
import { cellText, momentOf, momentText, monthText, type PeriodForm, periodText } from "./period-text.js";
import { ambiguousDate, noPeriod, noSuchPeriod, stepMissing } from "./refusals.js";
import { suggestedStep } from "./suggested-step.js";

/** Where the rows of a record lie on its calendar. */
export interface PlacedRows {
  /** The period column, or "year, week" for a pair. */
  readonly column: string;
  readonly calendar: Calendar;
  /** How the record writes its periods. */
  readonly form: PeriodForm;
  /** In steps from a fixed origin, one a row; whole numbers when rows lie on the step. */
  readonly position: Float64Array;
  /** In `calendar.step.of`: as read where the column holds numbers, else from the earliest row. */
  readonly time: Float64Array;
  /** Moments at which the periods begin, where they are dates or pairs. */
  readonly moments: Float64Array | undefined;
  /** The period of a row as it was written. */
  readonly written: (row: number) => string;
}

/**
 * Puts the rows of a record on its calendar.
 *
 * @throws {ModelError} `step-missing` | `option-wrong` | `unit-unknown` | `no-period` | `ambiguous-date` | `no-such-period`.
 */
export function placedRows(
  table: ColumnTable,
  period: string | readonly [string, string],
  step: StepLength | CalendarName | undefined,
  isRead: IsRead = () => true,
): PlacedRows {
  if (typeof period !== "string")
    return rowsOfPair(table, period, calendarOf(step, period.join(", ")), isRead);
  const column = columnNamed(table, period, "the period");
  const first = column.find((cell: unknown, row) => isRead(row) && !isEmpty(cell));
  const isDated = first instanceof Date || (typeof first === "string" && Number.isNaN(Number(first)));
  if (step === undefined) throw stepMissing(period, ...suggestedStep(column, period, isDated));
  const calendar = calendarOf(step, period);
  if (!isDated) return rowsOfNumbers(column, period, calendar, isRead);
  return rowsOfDates(column, period, calendar, periodText(first)?.form ?? "date", isRead);
}

/** Whether a row is read at all: nothing is asked of the others. */
type IsRead = (row: number) => boolean;

function rowsOfNumbers(column: Column, name: string, calendar: Calendar, isRead: IsRead): PlacedRows {
  const { values } = numberColumn(column, name, false, isRead);
  for (let row = 0; row < values.length; row++)
    if (Number.isNaN(values[row]) && isRead(row)) throw noPeriod(row + 1, name);
  const { every } = calendar.step;
  return {
    column: name,
    calendar,
    form: "number",
    position: every === 1 ? values : values.map((value) => value / every),
    time: values,
    moments: undefined,
    written: (row) => String(column[row]),
  };
}

/** Text that is not plainly a number is taken for a date; whether it is one is asked row by row. */
function rowsOfDates(
  column: Column,
  name: string,
  calendar: Calendar,
  form: PeriodForm,
  isRead: IsRead,
): PlacedRows {
  if (calendar.name === "4-4-5" ? form !== "trading-period" : numberOfMoment(calendar, 0) === undefined)
    throw optionWrong(
      "period",
      name,
      `a column of numbers, or a pair of columns such as ["year", "period"], for this step`,
    );
  const moments = new Float64Array(column.length).fill(Number.NaN);
  for (let row = 0; row < column.length; row++)
    if (isRead(row)) moments[row] = momentAt(column[row], row, name);
  // Texts such as 2025/26 number the record's years already, whenever these begin.
  const numbered =
    form === "year-pair" || form === "fiscal-year" ? { ...calendar, shift: noShift } : calendar;
  return placed(name, numbered, form, moments, (row) => cellText(column[row]));
}

function placed(
  column: string,
  calendar: Calendar,
  form: PeriodForm,
  moments: Float64Array,
  written: PlacedRows["written"],
): PlacedRows {
  const position = moments.map((moment) => numberOfMoment(calendar, moment)!);
  const earliest = position.reduce(
    (a, b) => (Number.isNaN(b) ? a : Math.min(a, b)),
    Number.POSITIVE_INFINITY,
  );
  const time = position.map((at) => (at - earliest) * calendar.step.every);
  return { column, calendar, form, position, time, moments, written };
}

function momentAt(cell: unknown, row: number, name: string): Moment {
  if (isEmpty(cell)) throw noPeriod(row + 1, name);
  const moment = momentOf(cell);
  if (moment === undefined) throw ambiguousDate(row + 1, name, cell);
  return moment;
}

function rowsOfPair(
  table: ColumnTable,
  pair: readonly [string, string],
  calendar: Calendar,
  isRead: IsRead,
): PlacedRows {
  if (!isNumberedByYear(calendar))
    throw optionWrong(
      "step",
      calendar.step.of,
      'one that a year numbers, such as "iso-week", "month" or "4-4-5"',
    );
  const [years, numbers] = pair.map(
    (name) => numberColumn(columnNamed(table, name, "the period"), name, false, isRead).values,
  );
  const moments = new Float64Array(years!.length).fill(Number.NaN);
  for (let row = 0; row < moments.length; row++) {
    if (!isRead(row)) continue;
    if (Number.isNaN(years![row]! + numbers![row]!)) throw noPeriod(row + 1, pair.join(", "));
    const found = momentOfPair(calendar, years![row]!, numbers![row]!);
    if (found === undefined) throw noSuchPeriod(row + 1, pair, years![row]!, numbers![row]!);
    moments[row] = found;
  }
  const form = pairForms[calendar.step.of] ?? "trading-period";
  return placed(pair.join(", "), calendar, form, moments, (row) => {
    const moment = moments[row]!;
    return calendar.months === undefined ? momentText(moment, form) : monthText(monthOf(moment), form);
  });
}

const pairForms: Readonly<Record<string, PeriodForm>> = {
  day: "date",
  week: "iso-week",
  month: "month",
  quarter: "quarter",
  year: "year",
};
