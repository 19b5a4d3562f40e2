import { nearestNames } from "../../numeric/index.js";
import type { StepLength } from "../observations.js";
import {
  dayLength,
  type Moment,
  mondayBefore,
  mondayOf,
  monthNumber,
  monthOf,
  startOfMonth,
} from "./moment.js";
import { beginsWrong, stepWrong, unitUnknown } from "./refusals.js";

/** A way of counting periods: by name, or a number of units of time. */
export type CalendarName =
  | "second"
  | "minute"
  | "half-hour"
  | "hour"
  | "day"
  | "week"
  | "iso-week"
  | "28-day"
  | "month"
  | "month-end"
  | "4-4-5"
  | "quarter"
  | "year"
  | "survey-year";

/** How periods are counted: in a fixed length of time, in months, or as the numbers of the column. */
export interface Calendar {
  readonly name: CalendarName | undefined;
  readonly step: StepLength;
  /** Milliseconds of one unit of the step, where every unit has the same length. */
  readonly length: number | undefined;
  /** Months of one unit of the step, where units are months, quarters or years. */
  readonly months: number | undefined;
  readonly shift: YearShift;
}

/** By how many months and days the record's year begins after 1 January. */
interface YearShift {
  readonly months: number;
  readonly days: number;
}

export const noShift: YearShift = { months: 0, days: 0 };

const unitLengths: Readonly<Record<string, number>> = {
  second: 1000,
  minute: 60_000,
  "half-hour": 1_800_000,
  hour: 3_600_000,
  day: dayLength,
  week: 7 * dayLength,
};
const unitMonths: Readonly<Record<string, number>> = { month: 1, quarter: 3, year: 12 };
const timeUnits: readonly string[] = [...Object.keys(unitLengths), ...Object.keys(unitMonths)];

/** Periods that a numbered record may count without any length in time (words of the trades, no source). */
const countedUnits: readonly string[] = [
  "period",
  "step",
  "reading",
  "generation",
  "transfer",
  "passage",
  "cycle",
  "batch",
  "dose",
  "season",
];

/** Whether a word is a unit of time that dates can be counted in. */
export function isTimeUnit(word: string): boolean {
  return timeUnits.includes(word);
}

/** The unit of time that is so many times shorter than another: a sixtieth of a minute is a second. */
export function unitWithin(unit: string, times: number): string | undefined {
  const part = (units: Readonly<Record<string, number>>): string | undefined =>
    Object.keys(units).find((other) => units[other]! * times === units[unit]);
  return part(unitLengths) ?? part(unitMonths);
}

const namedSteps: Readonly<Record<CalendarName, StepLength>> = {
  second: { every: 1, of: "second" },
  minute: { every: 1, of: "minute" },
  "half-hour": { every: 1, of: "half-hour" },
  hour: { every: 1, of: "hour" },
  day: { every: 1, of: "day" },
  week: { every: 1, of: "week" },
  "iso-week": { every: 1, of: "week" },
  "28-day": { every: 28, of: "day" },
  month: { every: 1, of: "month" },
  "month-end": { every: 1, of: "month" },
  "4-4-5": { every: 1, of: "period" },
  quarter: { every: 1, of: "quarter" },
  year: { every: 1, of: "year" },
  "survey-year": { every: 1, of: "year" },
};

/**
 * The calendar that the option `step` asks for.
 *
 * @param column - name of the period column: a record may count a unit of its own if its column is named so.
 * @throws {ModelError} `option-wrong` | `unit-unknown`.
 */
export function calendarOf(step: StepLength | CalendarName | undefined, column: string): Calendar {
  const names = Object.keys(namedSteps);
  if (typeof step === "string") {
    if (Object.hasOwn(namedSteps, step)) return counted(namedSteps[step], step);
    throw stepWrong(step, names, nearestNames(step, names));
  }
  if (!(typeof step === "object" && step !== null && step.every > 0 && Number.isFinite(step.every)))
    throw stepWrong(step, names, []);
  const units = [...timeUnits, ...countedUnits];
  if (!units.includes(step.of) && step.of !== column)
    throw unitUnknown(step.of, units, nearestNames(String(step.of), units));
  return counted(step, undefined);
}

function counted(step: StepLength, name: CalendarName | undefined): Calendar {
  const { every, of, begins } = step;
  return {
    name,
    step: { every, of, ...(begins !== undefined && { begins }) },
    length: unitLengths[of],
    months: name === "4-4-5" ? 1 : unitMonths[of],
    shift: shiftOf(step),
  };
}

/** @throws {ModelError} `option-wrong` when `begins` is no day that every year has, or the step no number of years. */
export function shiftOf({ begins, of }: StepLength): YearShift {
  if (begins === undefined) return noShift;
  const [month, day] = (/^(\d{2})-(\d{2})$/.exec(begins) ?? []).slice(1).map(Number);
  const exists =
    month !== undefined && day !== undefined && month >= 1 && month <= 12 && day >= 1 && day <= 28;
  if (!exists || of !== "year") throw beginsWrong(begins, of);
  return { months: month - 1, days: day - 1 };
}

/**
 * The number of the period that a moment lies in, counted from a fixed origin; not whole where it lies off the step.
 * Undefined where the calendar cannot count dates.
 */
export function numberOfMoment(
  { name, step, length, months, shift }: Calendar,
  moment: Moment,
): number | undefined {
  if (name === "iso-week") return mondayBefore(moment) / (7 * dayLength);
  // Weeks begin on Mondays; 1970-01-01 was a Thursday.
  if (length !== undefined)
    return (moment + (step.of === "week" ? 3 * dayLength : 0)) / (length * step.every);
  if (months === undefined) return undefined;
  return periodOfMonths(moment, months, shift) / step.every;
}

/** Number of the month, quarter or year that a moment lies in, since year 0. */
export function periodOfMonths(moment: Moment, months: number, shift: YearShift): number {
  return Math.floor((monthOf(moment - shift.days * dayLength) - shift.months) / months);
}

/** Whether a year and a number within it name a period of the calendar. */
export function isNumberedByYear({ name, step: { of }, months }: Calendar): boolean {
  return months !== undefined || of === "week" || (of === "day" && name !== "28-day");
}

/** The moment at which a numbered period of a year begins; undefined where the year has no such period. */
export function momentOfPair(
  { step: { of }, months }: Calendar,
  year: number,
  number: number,
): Moment | undefined {
  if (!Number.isInteger(year) || !Number.isInteger(number) || number < 1) return undefined;
  if (of === "week") return mondayOf(year, number);
  const first = monthNumber(year, 1);
  if (months !== undefined)
    return number > 12 / months ? undefined : startOfMonth(first + (number - 1) * months);
  const day = startOfMonth(first) + (number - 1) * dayLength;
  return day < startOfMonth(first + 12) ? day : undefined;
}
