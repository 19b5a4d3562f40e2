import { fixedDecimals } from "./fixed-decimals.js";
import { formatDigits, type NumberFormat, numberFormat } from "./number-format.js";

/**
 * A share as a percentage. Only 0 is "0%" and only 1 is "100%": a share that would round to one of them is
 * "<1%" or ">99%".
 *
 * @param decimals - digits after the decimal sign; without them a level as it is typed, 0.975 as "97.5%".
 * @example percent(0.9996, 0); // ">99%"
 */
export function percent(share: number, decimals?: number, format: NumberFormat = numberFormat()): string {
  if (!Number.isFinite(share)) return "not available";
  if (decimals === undefined) return `${formatDigits(levelDigits(share), format)}%`;
  const smallest = 10 ** -(decimals + 2);
  const text = (value: number): string => `${formatDigits(fixedDecimals(value, decimals, 2), format)}%`;
  if (share > 0 && Number(fixedDecimals(share, decimals + 2)) === 0) return `<${text(smallest)}`;
  if (share < 1 && Number(fixedDecimals(share, decimals + 2)) === 1) return `>${text(1 - smallest)}`;
  return text(share);
}

/** Every digit that was typed, and none that the binary form of 0.95 adds. */
function levelDigits(share: number): string {
  const plain = fixedDecimals(Number(share.toPrecision(12)), 10, 2);
  return plain.replace(/\.?0+$/, "");
}
