/** A moment of a record: milliseconds since 1970 on the record's own clock, whatever zone it keeps. */
export type Moment = number;

export const dayLength = 86_400_000;

/** A day of the calendar; months run from 1 to 12. */
export interface CalendarDay {
  readonly year: number;
  readonly month: number;
  readonly day: number;
}

export function calendarDay(moment: Moment): CalendarDay {
  const at = new Date(moment);
  return { year: at.getUTCFullYear(), month: at.getUTCMonth() + 1, day: at.getUTCDate() };
}

/** Start of a day; undefined for one that does not exist, such as 2025-02-29. */
export function startOfDay(year: number, month: number, day: number): Moment | undefined {
  if (month < 1 || month > 12 || day < 1) return undefined;
  const at = monthNumber(year, month);
  return day > lastDayOf(at) ? undefined : dateIn(at, day);
}

/** Months since January of year 0: the number that month arithmetic is done in. */
export function monthNumber(year: number, month: number): number {
  return year * 12 + month - 1;
}

export function monthOf(moment: Moment): number {
  const { year, month } = calendarDay(moment);
  return monthNumber(year, month);
}

/** Year and month (1 to 12) of a month number. */
export function yearAndMonth(month: number): readonly [number, number] {
  const year = Math.floor(month / 12);
  return [year, month - year * 12 + 1];
}

export function startOfMonth(month: number): Moment {
  return dateIn(month, 1);
}

/** Number of days in a month. */
function lastDayOf(month: number): number {
  return Math.round((dateIn(month + 1, 1) - dateIn(month, 1)) / dayLength);
}

/** A day of a month, or the last one where the month has no such day: the 30th of February is its 28th or 29th. */
export function clampedDate(month: number, day: number): Moment {
  return dateIn(month, Math.min(day, lastDayOf(month)));
}

/** Date.UTC would take the years 0 to 99 for 1900 to 1999. */
function dateIn(month: number, day: number): Moment {
  const [year, ofYear] = yearAndMonth(month);
  return new Date(0).setUTCFullYear(year, ofYear - 1, day);
}

/** Whether a moment lies in the last day of its month: 28 February and 31 March both do. */
export function isMonthEnd(moment: Moment): boolean {
  return calendarDay(moment + dayLength).day === 1;
}

/** Milliseconds since midnight. */
export function clockOf(moment: Moment): number {
  return moment - Math.floor(moment / dayLength) * dayLength;
}

/** Monday of the week that a moment lies in; 1970-01-01 was a Thursday. */
export function mondayBefore(moment: Moment): Moment {
  const day = Math.floor(moment / dayLength);
  return (day - ((((day + 3) % 7) + 7) % 7)) * dayLength;
}

/** Monday of a week by ISO 8601: week 1 holds 4 January, and a year has 52 or 53 weeks. */
export function mondayOf(year: number, week: number): Moment | undefined {
  const first = mondayBefore(dateIn(monthNumber(year, 1), 4));
  const monday = first + (week - 1) * 7 * dayLength;
  return week >= 1 && monday < mondayBefore(dateIn(monthNumber(year + 1, 1), 4)) ? monday : undefined;
}

/** Year and number of the ISO 8601 week of a moment: the year is that of the week's Thursday. */
export function isoWeekOf(moment: Moment): readonly [number, number] {
  const monday = mondayBefore(moment);
  const { year } = calendarDay(monday + 3 * dayLength);
  return [year, Math.round((monday - mondayOf(year, 1)!) / (7 * dayLength)) + 1];
}
