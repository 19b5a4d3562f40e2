import type { Observations, ObservedGroup } from "../record/index.js";

/** How many days or months one unit of a step is. */
const unitDays: Readonly<Record<string, number>> = { day: 1, week: 7 };
const unitMonths: Readonly<Record<string, number>> = { month: 1, quarter: 3, year: 12 };

/**
 * The dates of steps, recorded or ahead, where the record's periods are dates written year-month-day.
 *
 * Months keep the day of the first row; a day that a month does not have becomes its last, and last days stay last.
 *
 * @returns undefined where periods are no such dates, or the step is no whole number of days or months.
 */
export function periodLabels(
  { period }: Observations,
  recorded: ObservedGroup,
  index: readonly number[],
): readonly string[] | undefined {
  const [first] = recorded.labels ?? [];
  const date = /^(\d{4})-(\d{2})-(\d{2})/.exec(first ?? "");
  const { every, of } = period.step;
  const days = unitDays[of];
  const months = unitMonths[of];
  if (date === null || (days === undefined && months === undefined)) return undefined;
  const [year, month, day] = date.slice(1).map(Number) as [number, number, number];
  if (days !== undefined)
    return index.map((t) => iso(new Date(Date.UTC(year, month - 1, day + t * every * days))));
  const stays = day === daysIn(year, month - 1);
  return index.map((t) => {
    const whole = month - 1 + t * every * months!;
    const last = daysIn(year, whole);
    return iso(new Date(Date.UTC(year, whole, stays ? last : Math.min(day, last))));
  });
}

/** Days of a month, months counted from January 0 on beyond the year's end. */
function daysIn(year: number, month: number): number {
  return new Date(Date.UTC(year, month + 1, 0)).getUTCDate();
}

function iso(date: Date): string {
  return date.toISOString().slice(0, 10);
}
