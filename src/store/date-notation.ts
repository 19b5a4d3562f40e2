/** Order of day and month in a date written with numbers. */
export type DateOrder = "day-month-year" | "month-day-year";

const numeric = /^(\d{1,2})([/.-])(\d{1,2})\2(\d{4})(?:[T ]+(\d{1,2}:\d{2}(?::\d{2})?))?$/;
const yearFirst = /^(\d{4})[/.](\d{1,2})[/.](\d{1,2})(?:[T ]+(\d{1,2}:\d{2}(?::\d{2})?))?$/;
const named = /^(\d{1,2})[ -]([a-z]{3})[a-z]*[ -](\d{4})$/i;
const monthNames = ["jan", "feb", "mar", "apr", "may", "jun", "jul", "aug", "sep", "oct", "nov", "dec"];

/** Possible orders of a date written with numbers: both when ambiguous; undefined when it is not such a date. */
export function possibleDateOrders(cell: string): readonly DateOrder[] | undefined {
  const found = numeric.exec(cell.trim());
  if (found === null) return undefined;
  const [first, second] = [Number(found[1]), Number(found[3])];
  const orders: DateOrder[] = [];
  if (first >= 1 && first <= 31 && second >= 1 && second <= 12) orders.push("day-month-year");
  if (second >= 1 && second <= 31 && first >= 1 && first <= 12) orders.push("month-day-year");
  return orders.length === 0 ? undefined : orders;
}

/** The date as 2026-03-31 (with its time, if it has one); undefined when it is not a date in this order. */
export function isoDate(cell: string, order: DateOrder): string | undefined {
  const found = numeric.exec(cell.trim());
  if (found === null || !possibleDateOrders(cell)?.includes(order)) return undefined;
  const [day, month] = order === "day-month-year" ? [found[1]!, found[3]!] : [found[3]!, found[1]!];
  return isoText(found[4]!, month, day, found[5]);
}

/** The date as 2026-03-31 of a cell that can be read in one way only: 2026/3/31 or 31 Mar 2026. */
export function unambiguousDate(cell: string): string | undefined {
  const first = yearFirst.exec(cell.trim());
  if (first !== null) return isoText(first[1]!, first[2]!, first[3]!, first[4]);
  const spelledOut = named.exec(cell.trim());
  const month = spelledOut === null ? -1 : monthNames.indexOf(spelledOut[2]!.toLowerCase());
  return month < 0 ? undefined : isoText(spelledOut![3]!, String(month + 1), spelledOut![1]!, undefined);
}

function isoText(year: string, month: string, day: string, time: string | undefined): string {
  const date = `${year}-${month.padStart(2, "0")}-${day.padStart(2, "0")}`;
  return time === undefined
    ? date
    : `${date} ${time.padStart(time.length === 4 || time.length === 7 ? time.length + 1 : 0, "0")}`;
}
