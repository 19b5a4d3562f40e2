import type { Column } from "../column-table.js";
import { numberColumn } from "../number-column.js";
import { isTimeUnit } from "./calendar.js";
import { calendarDay, dayLength, isMonthEnd, monthOf } from "./moment.js";
import { momentOf } from "./period-text.js";
import { unitText } from "./unit-text.js";

/**
 * How far apart the closest rows lie, in words, and the option that would fit them: for an error that asks, never
 * taken unasked.
 */
export function suggestedStep(column: Column, name: string, isDated: boolean): readonly [string, string] {
  return isDated ? ofDates(column) : ofNumbers(column, name);
}

function ofDates(column: Column): readonly [string, string] {
  const moments = Array.from<unknown>(column).flatMap((cell) => momentOf(cell) ?? []);
  const closest = closestOf(moments);
  const atEnds = moments.every(isMonthEnd);
  const months = atEnds || sameDay(moments) ? closestOf(moments.map(monthOf)) : 0;
  const fits: readonly (readonly [boolean, string, string])[] = [
    [months === 12, "one year", '"year"'],
    [months === 3, "one quarter", '"quarter"'],
    [months === 1, "one month", atEnds ? '"month-end"' : '"month"'],
    [closest === 7 * dayLength, "one week", '"week"'],
    [closest === dayLength, "one day", '"day"'],
    [closest === dayLength / 48, "half an hour", '"half-hour"'],
  ];
  const fit = fits.find(([holds]) => holds);
  if (fit !== undefined) return [fit[1], fit[2]];
  const days = closest / dayLength;
  const [every, of] = Number.isInteger(days) ? [days, "day"] : [Number((days * 24).toPrecision(6)), "hour"];
  return [unitText(every, of), `{ every: ${every}, of: "${of}" }`];
}

/** Whether every date is of the same day of its month, one of those that every month has. */
function sameDay(moments: readonly number[]): boolean {
  const days = new Set(moments.map((moment) => calendarDay(moment).day));
  return days.size === 1 && [...days][0]! <= 28;
}

function ofNumbers(column: Column, name: string): readonly [string, string] {
  const closest = Number(closestOf(Array.from(numberColumn(column, name).values)).toPrecision(6));
  const unit = name.trim().toLowerCase().replace(/s$/, "");
  return isTimeUnit(unit)
    ? [String(closest), `{ every: ${closest}, of: "${unit}" }`]
    : [String(closest), `{ every: ${closest}, of: "hour" }, or whatever unit the column counts,`];
}

/** Smallest distance between neighbours that differ; 0 where there is none. */
function closestOf(places: readonly number[]): number {
  const apart = places.slice(1).map((place, i) => Math.abs(place - places[i]!));
  const least = apart.reduce((a, b) => (b > 0 && b < a ? b : a), Number.POSITIVE_INFINITY);
  return Number.isFinite(least) ? least : 0;
}
