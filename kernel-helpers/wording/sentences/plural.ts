import { formatDigits, numberFormat } from "../numbers/number-format.js";

/** A count in the number format in force: "12,345". */
export const count = (n: number): string => formatDigits(String(n), numberFormat());

/**
 * A count with its noun.
 *
 * @param many - the plural, where it is not the singular with "s".
 * @example plural(3, "row"); // "3 rows"
 */
export function plural(n: number, one: string, many = `${one}s`): string {
  return `${count(n)} ${n === 1 ? one : many}`;
}

/**
 * How many of how many.
 *
 * @param many - plural of the noun, where it is not the singular with "s".
 * @example nOfM(3, 12, "row"); // "3 of 12 rows"
 */
export function nOfM(n: number, of: number, one: string, many = `${one}s`): string {
  if (n === 0) return `none of the ${plural(of, one, many)}`;
  if (n === of && of > 1) return `all ${plural(of, one, many)}`;
  return `${count(n)} of ${plural(of, one, many)}`;
}
