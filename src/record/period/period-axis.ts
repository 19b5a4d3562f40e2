import type { StepLength } from "../observations.js";
import { type CalendarName, noShift, periodOfMonths, shiftOf } from "./calendar.js";
import { clampedDate, type Moment, mondayBefore } from "./moment.js";
import { momentText, monthText, type PeriodForm, type PeriodText, periodText } from "./period-text.js";

/**
 * The axis that the periods of a record lie on: which label a period has, and which period a label names.
 *
 * Plain data, so that every result that carries it can be sent to a worker, cloned and written as JSON; what it
 * answers are the functions beside it. Periods are counted from 0 at the origin, the first row of the record or
 * of the series that the axis belongs to.
 */
export interface PeriodAxis {
  readonly kind: "period-axis";
  /** The period column, or "year, week" for a pair. */
  readonly column: string;
  /** Unit of the step: "month". */
  readonly unit: string;
  readonly step: StepLength;
  /** The calendar's name, where one was chosen by name. */
  readonly calendar?: CalendarName;
  /** How labels are written. */
  readonly form: PeriodForm;
  /** What period 0 is counted in: the record's own numbers, moments, or months. */
  readonly counts: "numbers" | "moments" | "months";
  /** Period 0: the number, the moment in milliseconds since 1970, or the months since year 0. */
  readonly origin: number;
  /** Numbers, milliseconds or months from one period to the next. */
  readonly stride: number;
  /** Day of the month of a dated label, its last one where a month has no such day; 31: always the last. */
  readonly day?: number;
  /** Milliseconds after midnight of a label in months that has a time of day. */
  readonly clock?: number;
}

/** Off by less than this part of a step is a late or early reading of the step. */
export const leeway = 0.1;
/** Off by less than this part of a step is a matter of rounding. */
export const rounding = 1e-6;

/** The label of a period: "2027-03-31", "2027-W11", or its number where the record counts in numbers. */
export function labelAt(axis: PeriodAxis, index: number): string {
  const at = axis.origin + index * axis.stride;
  if (axis.counts === "numbers") return String(Number(at.toPrecision(12)));
  if (axis.counts === "months" && axis.day === undefined) return monthText(at, axis.form);
  return momentText(momentAt(axis, index), axis.form);
}

/** The labels of several periods. */
export function labelsAt(axis: PeriodAxis, indexes: ArrayLike<number>): readonly string[] {
  return Array.from(indexes, (index) => labelAt(axis, index));
}

/**
 * What a place between two periods is called: the date or number that lies there, or, where labels name whole weeks,
 * months or years, the one that it lies in.
 */
export function labelBetween(axis: PeriodAxis, index: number, fraction: number): string {
  const place = index + fraction;
  if (Math.abs(place - Math.round(place)) <= rounding) return labelAt(axis, Math.round(place));
  if (axis.counts === "numbers") return labelAt(axis, place);
  if (!isDated(axis)) return labelAt(axis, Math.ceil(place));
  const [before, after] = [momentAt(axis, Math.floor(place)), momentAt(axis, Math.floor(place) + 1)];
  return momentText(before + (after - before) * (place - Math.floor(place)), axis.form);
}

/** A period in a sentence: "month 33", or its label where periods are not mere numbers. */
export function periodWords(axis: PeriodAxis, index: number): string {
  return axis.counts === "numbers" ? `${axis.unit} ${labelAt(axis, index)}` : labelAt(axis, index);
}

function momentAt({ counts, origin, stride, day = 1, clock = 0 }: PeriodAxis, index: number): Moment {
  const at = origin + index * stride;
  return counts === "months" ? clampedDate(at, day) + clock : at;
}

/**
 * The period that a label names, as a row of that label would be placed; undefined where it names none, or several.
 *
 * A numbered record is asked by its numbers. A dated one by any text that a period column may hold: a date, a month
 * or a week that holds a single period of the record is as good as its own label.
 */
export function indexOf(axis: PeriodAxis, label: string | number | Date): number | undefined {
  if (axis.counts === "numbers") return whole((numberIn(label) - axis.origin) / axis.stride, rounding);
  const read = periodText(typeof label === "number" ? String(label) : label);
  if (read === undefined) return undefined;
  const [from, to] = axis.counts === "months" ? monthsOf(axis, read) : momentsOf(axis, read);
  if (from === to) return from + 0;
  // No period lies in what the text names: a day or a time close to one is taken for it, as a late reading is.
  const isClose = axis.counts === "moments" && from > to && isInstant(read);
  return isClose ? whole((read.start - axis.origin) / axis.stride, leeway) : undefined;
}

const isInstant = ({ form }: PeriodText): boolean => form === "date" || form === "millisecond";

function numberIn(label: string | number | Date): number {
  return label instanceof Date || String(label).trim() === "" ? Number.NaN : Number(label);
}

/** First and last period of the months that a text names; the last before the first where there is none. */
function monthsOf({ origin, stride, step, form }: PeriodAxis, read: PeriodText): readonly [number, number] {
  const months = stride / step.every;
  const namesYears = yearForms.includes(read.form);
  // Which fiscal year a date falls into is known only where the record says when its years begin.
  const isFiscal = form === "fiscal-year" || (form === "year-pair" && step.begins === undefined);
  if (isFiscal && !namesYears) return [1, 0];
  const shift = namesYears ? noShift : shiftOf(step);
  const placeOf = (moment: Moment): number =>
    (periodOfMonths(moment, months, shift) - Math.floor(origin / months)) / step.every;
  return [Math.ceil(placeOf(read.start) - rounding), Math.floor(placeOf(read.end - 1) + rounding)];
}

const yearForms: readonly PeriodForm[] = ["year", "year-pair", "fiscal-year"];

/** First and last period whose moment a text names; weeks are named by any day of theirs. */
function momentsOf(axis: PeriodAxis, { start, end }: PeriodText): readonly [number, number] {
  const { origin, stride } = axis;
  if (axis.calendar !== "iso-week" && axis.form !== "iso-week")
    return [
      Math.ceil((start - origin) / stride - rounding),
      Math.ceil((end - origin) / stride - rounding) - 1,
    ];
  const placeOf = (moment: Moment): number => (mondayBefore(moment) - mondayBefore(origin)) / stride;
  return [Math.ceil(placeOf(start) - rounding), Math.floor(placeOf(end - 1) + rounding)];
}

function whole(place: number, tolerance: number): number | undefined {
  const nearest = Math.round(place);
  // `+ 0` makes a negative zero a plain one.
  return Math.abs(place - nearest) <= tolerance ? nearest + 0 : undefined;
}

/**
 * How many periods after the origin of one axis that of another lies; undefined where the two count differently, or
 * lie between each other's periods.
 */
export function periodsAfter(axis: PeriodAxis, other: PeriodAxis): number | undefined {
  if (axis.counts !== other.counts || axis.stride !== other.stride) return undefined;
  if (axis.counts === "numbers") return whole((other.origin - axis.origin) / axis.stride, leeway);
  return indexOf(axis, isDated(axis) && isDated(other) ? new Date(momentAt(other, 0)) : labelAt(other, 0));
}

/** Whether labels name a day or a time, and not a whole month, year or week. */
function isDated({ counts, form, day }: PeriodAxis): boolean {
  return counts === "moments" ? form !== "iso-week" : day !== undefined;
}
