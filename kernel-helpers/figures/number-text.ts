import { numberFormat, significant as toDigits } from "../wording/index.js";

/** A number in the text of a figure: four significant digits in the current number format; infinity as a word. */
export function significant(value: number): string {
  if (value === Number.POSITIVE_INFINITY) return "infinity";
  if (value === Number.NEGATIVE_INFINITY) return "minus infinity";
  return toDigits(value, 4, numberFormat());
}
