import { decimalsFor, fixedDecimals } from "./fixed-decimals.js";
import { formatDigits, type NumberFormat } from "./number-format.js";

/** A number to so many significant digits; with a power of ten where plain digits would be mostly zeros. */
export function significant(value: number, digits: number, format: NumberFormat): string {
  if (value === 0) return "0";
  const size = Math.abs(value);
  if (size >= 1e9 || size < 1e-4) return powerOfTen(value, digits - 1, format);
  // Digits before the point are never rounded away: 12,345 stays 12,345 at four digits.
  const plain = fixedDecimals(value, Math.max(0, decimalsFor(value, digits)));
  return formatDigits(plain.includes(".") ? plain.replace(/\.?0+$/, "") : plain, format);
}

/** A number as mantissa and exponent: "1.2e-7". */
export function powerOfTen(value: number, decimals: number, format: NumberFormat): string {
  const [mantissa = "", exponent = ""] = value.toExponential(Math.min(15, decimals)).split("e");
  return `${formatDigits(mantissa, format)}e${Number(exponent)}`;
}
