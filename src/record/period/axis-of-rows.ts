import type { Calendar } from "./calendar.js";
import { calendarDay, clockOf, dayLength, isMonthEnd, type Moment, mondayBefore, monthOf } from "./moment.js";
import { type PeriodAxis, rounding } from "./period-axis.js";
import type { PeriodForm } from "./period-text.js";
import type { PlacedRows } from "./placed-rows.js";

/** Rows of a record (0-based) and the period of each, counted from the first of them. */
export interface IndexedRows {
  readonly rows: Int32Array;
  readonly index: Int32Array;
}

/**
 * The axis of some rows. Where on its period a label lies is decided from all rows, not from the first: 28 February
 * and 28 March are recorded on the 28th, 31 January and 28 February at the end of the month.
 */
export function axisOfRows(placed: PlacedRows, indexed: IndexedRows): PeriodAxis {
  const { column, calendar, moments } = placed;
  const { step, name } = calendar;
  const common = {
    kind: "period-axis",
    column,
    unit: step.of,
    step,
    ...(name && { calendar: name }),
  } as const;
  const own =
    moments === undefined
      ? numbersOf(placed, indexed)
      : calendar.months === undefined
        ? momentsOf(placed, moments, indexed)
        : monthsOf(placed, moments, calendar.months, indexed);
  return { ...common, ...own };
}

type Counted = Pick<PeriodAxis, "form" | "counts" | "origin" | "stride" | "day" | "clock">;

function numbersOf({ time, calendar }: PlacedRows, { rows, index }: IndexedRows): Counted {
  const { every } = calendar.step;
  const first = time[rows[0]!]!;
  const originOf = (i: number): number => time[rows[i]!]! - index[i]! * every;
  // Most records lie on their step but for the rounding of binary fractions.
  let isEven = true;
  for (let i = 0; i < rows.length && isEven; i++) isEven = Math.abs(originOf(i) - first) <= rounding * every;
  const origin = isEven ? first : mostCommon(rows.length, (i) => Number(originOf(i).toPrecision(12))).value;
  return { form: "number", counts: "numbers", origin, stride: every };
}

function momentsOf(
  { calendar, form }: PlacedRows,
  moments: Float64Array,
  { rows, index }: IndexedRows,
): Counted {
  const stride = calendar.length! * calendar.step.every;
  const { value, count } = mostCommon(rows.length, (i) => moments[rows[i]!]! - index[i]! * stride);
  const isWeekly = stride % (7 * dayLength) === 0;
  const anyDay = calendar.name === "iso-week" && 2 * count <= rows.length;
  if (isWeekly && (form === "iso-week" || anyDay))
    return { form: "iso-week", counts: "moments", origin: mondayBefore(value), stride };
  return { form: finestForm(value, stride), counts: "moments", origin: value, stride };
}

/** The shortest form that tells the moments of an axis apart. */
function finestForm(origin: Moment, stride: number): PeriodForm {
  const fits = (length: number): boolean => origin % length === 0 && stride % length === 0;
  if (fits(dayLength)) return "date";
  return fits(60_000) ? "minute" : fits(1000) ? "second" : "millisecond";
}

function monthsOf(
  { calendar, form, position }: PlacedRows,
  moments: Float64Array,
  months: number,
  { rows }: IndexedRows,
): Counted {
  const { every } = calendar.step;
  const counted = { counts: "months", stride: every * months } as const;
  const first = Math.round(position[rows[0]!]! * every) * months;
  const recorded = Array.from(rows, (row) => moments[row]!);
  const day =
    isDay(form) && calendar.step.begins === undefined ? dayOf(recorded, calendar, months) : undefined;
  if (day === undefined) return { ...counted, form: wholeForm(calendar, form), origin: first };
  const offset = monthOf(recorded[0]!) - first;
  const clock = mostCommon(recorded.length, (i) => clockOf(recorded[i]!)).value;
  return {
    ...counted,
    form: clock === 0 ? "date" : finestForm(clock, dayLength),
    origin: first + offset,
    day,
    ...(clock > 0 && { clock }),
  };
}

const isDay = (form: PeriodForm): boolean => form === "date" || form === "millisecond" || form === "iso-week";

/** How whole periods are written: as the record writes them, else by their unit. */
function wholeForm({ step: { of, every, begins } }: Calendar, form: PeriodForm): PeriodForm {
  if (begins !== undefined) return "year-pair";
  if (of === "year") return form === "year-pair" || form === "fiscal-year" ? form : "year";
  if (of === "period") return "trading-period";
  return of === "quarter" || (form === "quarter" && every % 3 === 0) ? "quarter" : "month";
}

/**
 * The day of the month that all dates share; else the one that more than half of them share, where a date at the end
 * of a shorter month agrees with every later day, and 31 means the last day. Undefined where there is none, or the dates lie in unlike months of their
 * quarters or years.
 */
function dayOf(dates: readonly Moment[], { name }: Calendar, months: number): number | undefined {
  const ofPeriod = (date: Moment): number => ((monthOf(date) % months) + months) % months;
  if (dates.some((date) => ofPeriod(date) !== ofPeriod(dates[0]!))) return undefined;
  if (name === "month-end") return 31;
  const { day: first } = calendarDay(dates[0]!);
  if (dates.every((date) => calendarDay(date).day === first)) return first;
  const agreeing = new Array<number>(32).fill(0);
  for (const date of dates) {
    const { day } = calendarDay(date);
    const last = isMonthEnd(date) ? 31 : day;
    for (let candidate = day; candidate <= last; candidate++) agreeing[candidate]!++;
  }
  const most = Math.max(...agreeing);
  return 2 * most > dates.length ? agreeing.lastIndexOf(most) : undefined;
}

/** The value that occurs most often; of several the first. */
function mostCommon(
  length: number,
  valueAt: (place: number) => number,
): { readonly value: number; readonly count: number } {
  const counts = new Map<number, number>();
  for (let i = 0; i < length; i++) {
    const value = valueAt(i);
    counts.set(value, (counts.get(value) ?? 0) + 1);
  }
  let most = { value: Number.NaN, count: 0 };
  for (const [value, count] of counts) if (count > most.count) most = { value, count };
  return most;
}
