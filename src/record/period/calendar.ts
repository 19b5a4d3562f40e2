import type { StepLength } from "../observations.js";
import { dayLength, type Moment, mondayBefore, mondayOf, monthNumber, monthsLater } from "./calendar-date.js";

/** A way of counting periods: by name, or a number of units of time. */
export type CalendarName =
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

/** How a calendar numbers its periods, one whole number a period. */
export interface Calendar {
  readonly name: CalendarName | undefined;
  readonly step: StepLength;
  /** Number of the period that a date lies in; not whole when dates may lie off the step. */
  readonly ofDate: ((moment: Moment) => number) | undefined;
  /** The moment some steps after another; the last day of a month stays a last day. */
  readonly after: ((moment: Moment, steps: number) => Moment) | undefined;
  /** Number of the period named by a year and a number within it, or undefined when there is none. */
  readonly ofYearAndNumber: ((year: number, number: number) => number | undefined) | undefined;
}

const unitLengths: Readonly<Record<string, number>> = {
  second: 1000,
  minute: 60_000,
  "half-hour": 1_800_000,
  hour: 3_600_000,
  day: dayLength,
  week: 7 * dayLength,
};
const unitMonths: Readonly<Record<string, number>> = { month: 1, quarter: 3, year: 12 };

/** "hours" is "hour"; any other word is kept, for periods such as a transfer or a generation. */
export function singular(unit: string): string {
  const one = unit.trim().replace(/s$/, "");
  return isUnit(one) ? one : unit.trim();
}

/** Whether a word is a unit of time that dates can be counted in. */
export function isUnit(word: string): boolean {
  return Object.hasOwn(unitLengths, word) || Object.hasOwn(unitMonths, word);
}

/** Counts every so many units of time: hours, days, months, or transfers, where the column holds numbers. */
export function everyUnit(step: StepLength, name?: CalendarName): Calendar {
  const of = singular(step.of);
  const [length, months] = [unitLengths[of], unitMonths[of]];
  return {
    name,
    step: { every: step.every, of },
    ofDate:
      length !== undefined
        ? (moment) => moment / (length * step.every)
        : months !== undefined
          ? (moment) => Math.floor(monthNumber(moment) / months) / step.every
          : undefined,
    after: afterSteps(length, months, step.every),
    ofYearAndNumber: months === undefined ? undefined : numbered(12 / months, step.every),
  };
}

function afterSteps(
  length: number | undefined,
  months: number | undefined,
  every: number,
): Calendar["after"] {
  if (length !== undefined) return (moment, steps) => moment + steps * every * length;
  return months === undefined ? undefined : (moment, steps) => monthsLater(moment, steps * every * months);
}

function numbered(inAYear: number, every: number): Calendar["ofYearAndNumber"] {
  return (year, number) =>
    number >= 1 && number <= inAYear ? (year * inAYear + number - 1) / every : undefined;
}

const isoWeeks: Calendar = {
  name: "iso-week",
  step: { every: 1, of: "week" },
  ofDate: (moment) => mondayBefore(moment) / (7 * dayLength),
  after: (moment, steps) => moment + steps * 7 * dayLength,
  ofYearAndNumber: (year, week) => {
    const monday = mondayOf(year, week);
    return monday === undefined ? undefined : monday / (7 * dayLength);
  },
};

/** Twelve trading periods a year of four, four and five weeks; a date alone does not say when the year begins. */
const fourFourFive: Calendar = {
  name: "4-4-5",
  step: { every: 1, of: "period" },
  ofDate: undefined,
  after: undefined,
  ofYearAndNumber: numbered(12, 1),
};

const named: Readonly<Record<CalendarName, Calendar>> = {
  "half-hour": everyUnit({ every: 1, of: "half-hour" }, "half-hour"),
  hour: everyUnit({ every: 1, of: "hour" }, "hour"),
  day: everyUnit({ every: 1, of: "day" }, "day"),
  week: everyUnit({ every: 1, of: "week" }, "week"),
  "iso-week": isoWeeks,
  "28-day": everyUnit({ every: 28, of: "day" }, "28-day"),
  month: everyUnit({ every: 1, of: "month" }, "month"),
  "month-end": everyUnit({ every: 1, of: "month" }, "month-end"),
  "4-4-5": fourFourFive,
  quarter: everyUnit({ every: 1, of: "quarter" }, "quarter"),
  year: everyUnit({ every: 1, of: "year" }, "year"),
  "survey-year": everyUnit({ every: 1, of: "year" }, "survey-year"),
};

export const calendarNames: readonly string[] = Object.keys(named);

/** The calendar of a name, or undefined when there is none. */
export function calendarNamed(name: string): Calendar | undefined {
  return Object.hasOwn(named, name) ? named[name as CalendarName] : undefined;
}
