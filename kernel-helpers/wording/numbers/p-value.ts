import { fixedDecimals } from "./fixed-decimals.js";
import { formatDigits, numberFormat } from "./number-format.js";

/**
 * A p-value in a sentence: two decimals, three below 0.01, and a bound where more digits would say nothing.
 *
 * @see American Psychological Association (2020), Publication Manual, 7th edition, section 6.36: exact values to
 *   two or three decimals, those below .001 as "< .001".
 * @example pValue(0.0312); // "p = 0.03"
 */
export function pValue(p: number): string {
  if (!Number.isFinite(p)) return "p not available";
  const text = (value: number, decimals: number): string =>
    formatDigits(fixedDecimals(value, decimals), numberFormat());
  if (p < 0.001) return `p < ${text(0.001, 3)}`;
  if (p > 0.99) return `p > ${text(0.99, 2)}`;
  return `p = ${text(p, p < 0.01 ? 3 : 2)}`;
}
