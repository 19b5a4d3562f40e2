import {
  calendarDay,
  clockOf,
  dayLength,
  isoWeekOf,
  type Moment,
  mondayOf,
  monthNumber,
  startOfDay,
  startOfMonth,
  yearAndMonth,
} from "./moment.js";

/**
 * How a period is written: 12.5, 2026-03-31, 2026-03-31 14:30 (:15, .250), 2026-W53, 2026-03, 2026-Q1, 2026,
 * 2025/26, FY2026, or 2026-P11 for one of twelve trading periods.
 */
export type PeriodForm =
  | "number"
  | "date"
  | "minute"
  | "second"
  | "millisecond"
  | "iso-week"
  | "month"
  | "quarter"
  | "year"
  | "year-pair"
  | "fiscal-year"
  | "trading-period";

/** A stretch of time that a text names: from its start to before its end. */
export interface PeriodText {
  readonly form: PeriodForm;
  readonly start: Moment;
  readonly end: Moment;
}

const date =
  /^(\d{4})-(\d{2})-(\d{2})(?:[T ](\d{2}):(\d{2})(?::(\d{2})(\.\d+)?)?)?\s*(?:Z|[+-]\d{2}:?\d{2})?$/;

/** Forms that name a year and perhaps a number within it. */
const numbered: readonly (readonly [PeriodForm, RegExp])[] = [
  ["month", /^(\d{4})-(\d{2})$/],
  ["iso-week", /^(\d{4})-?W(\d{2})$/],
  ["quarter", /^(\d{4})-?Q([1-4])$/],
  ["year-pair", /^(\d{4})\/(\d{4}|\d{2})$/],
  ["fiscal-year", /^FY ?(\d{4})$/],
  ["trading-period", /^(\d{4})-?P(\d{2})$/],
  ["year", /^(\d{4})$/],
];

/**
 * What a text says of time, or undefined where it says nothing that can be told.
 *
 * Read are Date values, the forms of ISO 8601 (2026-03-31, 2026-03-31 14:30, 2026-W53, 2026-03) and the trades' own
 * (2026-Q1, 2025/26, FY2026, 2026-P11). A zone is read and dropped: rows are compared on the record's clock.
 * 03/04/2025 is none of these, because its order of day and month cannot be told.
 */
export function periodText(cell: unknown): PeriodText | undefined {
  if (cell instanceof Date) {
    const at = cell.getTime();
    return Number.isNaN(at) ? undefined : { form: "millisecond", start: at, end: at + 1 };
  }
  if (typeof cell !== "string") return undefined;
  const text = cell.trim();
  const dated = ofDate(text);
  if (dated !== undefined) return dated;
  for (const [form, pattern] of numbered) {
    const found = pattern.exec(text);
    if (found !== null) return ofYear(form, Number(found[1]), found[2] ?? "1");
  }
  return undefined;
}

/** The moment at which what a cell names begins; a plain year is a number of the record, not a date. */
export function momentOf(cell: unknown): Moment | undefined {
  const read = periodText(cell);
  return read?.form === "year" ? undefined : read?.start;
}

function ofDate(text: string): PeriodText | undefined {
  const found = date.exec(text);
  if (found === null) return undefined;
  const [, year, month, day, hour, minute, second, fraction] = found;
  const start = startOfDay(Number(year), Number(month), Number(day));
  if (start === undefined) return undefined;
  if (hour === undefined) return { form: "date", start, end: start + dayLength };
  if (Number(hour) > 24 || Number(minute) > 59 || Number(second ?? 0) > 60) return undefined;
  const at =
    start + ((Number(hour) * 60 + Number(minute)) * 60 + Number(second ?? 0) + Number(fraction ?? 0)) * 1000;
  return { form: "millisecond", start: at, end: at + 1 };
}

const monthsIn: Partial<Record<PeriodForm, number>> = { month: 1, quarter: 3, "trading-period": 1 };

function ofYear(form: PeriodForm, year: number, number: string): PeriodText | undefined {
  if (form === "iso-week") {
    const monday = mondayOf(year, Number(number));
    return monday === undefined ? undefined : { form, start: monday, end: monday + 7 * dayLength };
  }
  if (form === "year-pair" && Number(number.slice(-2)) !== (year + 1) % 100) return undefined;
  const months = monthsIn[form] ?? 12;
  const place = months === 12 ? 1 : Number(number);
  if (place < 1 || place * months > 12) return undefined;
  const first = monthNumber(year, 1) + (place - 1) * months;
  return { form, start: startOfMonth(first), end: startOfMonth(first + months) };
}

/** A moment as a text of a form that names a stretch of days or an instant. */
export function momentText(moment: Moment, form: PeriodForm): string {
  if (form === "iso-week") {
    const [year, week] = isoWeekOf(moment);
    return `${fourDigits(year)}-W${twoDigits(week)}`;
  }
  const { year, month, day } = calendarDay(moment);
  const dated = `${fourDigits(year)}-${twoDigits(month)}-${twoDigits(day)}`;
  return form === "date" ? dated : `${dated} ${clockText(clockOf(moment), form)}`;
}

/** Hours and minutes, with seconds where the form has them. */
function clockText(clock: number, form: PeriodForm): string {
  const minutes = Math.floor(clock / 60_000);
  const seconds = (clock - minutes * 60_000) / 1000;
  const told = `${twoDigits(Math.floor(minutes / 60))}:${twoDigits(minutes % 60)}`;
  if (form === "minute") return told;
  return `${told}:${form === "second" ? twoDigits(Math.floor(seconds)) : seconds.toFixed(3).padStart(6, "0")}`;
}

/** A cell as it is written; a date of a table as year, month and day. */
export function cellText(cell: unknown): string {
  if (!(cell instanceof Date)) return String(cell);
  return momentText(cell.getTime(), clockOf(cell.getTime()) === 0 ? "date" : "minute");
}

/** A month, or the quarter or year that begins with it, as a text. */
export function monthText(month: number, form: PeriodForm): string {
  const [year, ofYear] = yearAndMonth(month);
  const written = fourDigits(year);
  if (form === "month") return `${written}-${twoDigits(ofYear)}`;
  if (form === "trading-period") return `${written}-P${twoDigits(ofYear)}`;
  if (form === "quarter") return `${written}-Q${Math.ceil(ofYear / 3)}`;
  if (form === "year-pair") return `${written}/${twoDigits((year + 1) % 100)}`;
  return form === "fiscal-year" ? `FY${written}` : written;
}

const twoDigits = (number: number): string => String(number).padStart(2, "0");
const fourDigits = (number: number): string => String(number).padStart(4, "0");
