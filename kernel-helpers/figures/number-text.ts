import { numberFormat, significant as toDigits } from "../tables/index.js";

/** A number in a sentence about a figure: four significant digits, in the number format in force. */
export function significant(value: number): string {
  return toDigits(value, 4, numberFormat());
}
