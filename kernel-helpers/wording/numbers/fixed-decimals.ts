/**
 * A number with fixed decimals, rounded half away from zero on its shortest decimal form.
 *
 * Rounding that form instead of the binary value gives 1.005 -> "1.01" and 2.675 -> "2.68", as a reader who rounds the
 * printed number by hand expects.
 *
 * @param value - finite.
 * @param decimals - digits after the point; negative rounds to tens, hundreds, ...
 * @param power - the number is first multiplied by 10 to this power, exactly (2 turns a share into per cent).
 * @returns plain digits with "-" and "." and no grouping.
 * @example fixedDecimals(1.005, 2); // "1.01"
 */
export function fixedDecimals(value: number, decimals: number, power: number = 0): string {
  const [mantissa = "0", exponent = "0"] = Math.abs(value).toExponential().split("e");
  const digits = mantissa.replace(".", "");
  const shift = Number(exponent) - (digits.length - 1) + power + decimals;
  return withDecimalPoint(scaledAndRounded(BigInt(digits), shift), decimals, value < 0);
}

/**
 * Minor units as a decimal: 129346n cents -> "1293.46". Exact at any size.
 *
 * @param minor - whole minor units of the currency.
 * @param decimals - digits of the minor unit: 2 for most currencies, 0 or 3 for some.
 */
export function minorUnits(minor: bigint, decimals: number): string {
  return withDecimalPoint(minor < 0n ? -minor : minor, decimals, minor < 0n);
}

/**
 * The number of decimals that shows this many significant digits.
 *
 * @example decimalsFor(0.0566, 2); // 3
 */
export function decimalsFor(value: number, significant: number): number {
  const exponent = Math.abs(value)
    .toExponential(significant - 1)
    .split("e")[1];
  return significant - 1 - Number(exponent ?? "0");
}

function scaledAndRounded(digits: bigint, shift: number): bigint {
  if (shift >= 0) return digits * 10n ** BigInt(shift);
  const unit = 10n ** BigInt(-shift);
  return (digits + unit / 2n) / unit;
}

function withDecimalPoint(units: bigint, decimals: number, negative: boolean): string {
  const sign = negative && units !== 0n ? "-" : "";
  if (decimals <= 0) return sign + units.toString() + (units === 0n ? "" : "0".repeat(-decimals));
  const text = units.toString().padStart(decimals + 1, "0");
  return `${sign}${text.slice(0, -decimals)}.${text.slice(-decimals)}`;
}
