/** A moment of a record: milliseconds since 1970 on the record's own clock, whatever zone it keeps. */
export type Moment = number;

export const dayLength = 86_400_000;

const date = /^(\d{4})-(\d{2})-(\d{2})(?:[T ](\d{2}):(\d{2})(?::(\d{2})(\.\d+)?)?)?\s*(Z|[+-]\d{2}:?\d{2})?$/;
const month = /^(\d{4})-(\d{2})$/;
const isoWeek = /^(\d{4})-?W(\d{2})$/;
const quarter = /^(\d{4})-?Q([1-4])$/;

/**
 * The moment that a cell names, or undefined when it names none.
 *
 * Read are Date values and the forms of ISO 8601: 2026-03-31, 2026-03-31 14:30, 2026-W53 (its Monday),
 * 2026-03 (its first day) and 2026-Q1. A zone is read and dropped: rows are compared on the record's clock.
 * 03/04/2025 is none of these, because its order of day and month cannot be told.
 */
export function momentOf(cell: unknown): Moment | undefined {
  if (cell instanceof Date) return Number.isNaN(cell.getTime()) ? undefined : cell.getTime();
  if (typeof cell !== "string") return undefined;
  const text = cell.trim();
  return ofDate(text) ?? ofMonth(text) ?? ofWeek(text) ?? ofQuarter(text);
}

function ofDate(text: string): Moment | undefined {
  const found = date.exec(text);
  if (found === null) return undefined;
  const [year, month, day, hour = 0, minute = 0, second = 0] = found.slice(1, 7).map(Number);
  const start = startOfDay(year!, month!, day!);
  if (start === undefined || hour > 24 || minute > 59 || second > 60) return undefined;
  const fraction = found[7] === undefined ? 0 : Number(found[7]);
  return start + ((orZero(hour) * 60 + orZero(minute)) * 60 + orZero(second) + fraction) * 1000;
}

const orZero = (value: number): number => (Number.isNaN(value) ? 0 : value);

/** Undefined for a day that does not exist, such as 2025-02-29. */
export function startOfDay(year: number, month: number, day: number): Moment | undefined {
  const moment = Date.UTC(year, month - 1, day);
  const back = new Date(moment);
  return back.getUTCMonth() === month - 1 && back.getUTCDate() === day ? moment : undefined;
}

function ofMonth(text: string): Moment | undefined {
  const found = month.exec(text);
  return found === null ? undefined : startOfDay(Number(found[1]), Number(found[2]), 1);
}

function ofQuarter(text: string): Moment | undefined {
  const found = quarter.exec(text);
  return found === null ? undefined : startOfDay(Number(found[1]), Number(found[2]) * 3 - 2, 1);
}

function ofWeek(text: string): Moment | undefined {
  const found = isoWeek.exec(text);
  return found === null ? undefined : mondayOf(Number(found[1]), Number(found[2]));
}

/** Monday of an ISO 8601 week: week 1 holds 4 January, and a year has 52 or 53 weeks. */
export function mondayOf(year: number, week: number): Moment | undefined {
  const first = mondayBefore(Date.UTC(year, 0, 4));
  const monday = first + (week - 1) * 7 * dayLength;
  return week >= 1 && monday < mondayBefore(Date.UTC(year + 1, 0, 4)) ? monday : undefined;
}

/** Monday of the week that a moment lies in; 1970-01-01 was a Thursday. */
export function mondayBefore(moment: Moment): Moment {
  const day = Math.floor(moment / dayLength);
  return (day - ((((day + 3) % 7) + 7) % 7)) * dayLength;
}

/** Months since year 0; the fraction of the month is dropped. */
export function monthNumber(moment: Moment): number {
  const at = new Date(moment);
  return at.getUTCFullYear() * 12 + at.getUTCMonth();
}

/** Whether a moment lies in the last day of its month: 28 February and 31 March both do. */
export function isMonthEnd(moment: Moment): boolean {
  return new Date(moment + dayLength).getUTCDate() === 1;
}

/**
 * The same day some months later, or the last of that month where it has no such day; the last day of a month
 * stays a last day, so that 31 January, 28 February and 31 March follow each other.
 */
export function monthsLater(moment: Moment, months: number): Moment {
  const at = new Date(moment);
  const [year, month] = [at.getUTCFullYear(), at.getUTCMonth() + months];
  const lastDay = new Date(Date.UTC(year, month + 1, 0)).getUTCDate();
  const day = isMonthEnd(moment) ? lastDay : Math.min(at.getUTCDate(), lastDay);
  return Date.UTC(year, month, day) + (((moment % dayLength) + dayLength) % dayLength);
}

/** A moment as a date, or as a date and time: 2026-03-31, 2026-03-31 14:30. */
export function momentText(moment: Moment, withTime: boolean): string {
  const text = new Date(moment).toISOString();
  return withTime ? text.slice(0, 16).replace("T", " ") : text.slice(0, 10);
}
