/** Which sign a written number uses before its decimals, as far as it shows. */
export type DecimalSign = "." | "," | "either" | "none";

const signs = /^\((.+)\)$|^(.+)-$|^[+\-\u2212]?\s*(.+)$/;
const digits = /^\d+$/;
const point = /^\d*\.\d*$|^\d+\.?\d*e[+-]?\d+$/i;
const comma = /^\d*,\d*$|^\d+,?\d*e[+-]?\d+$/i;
const groupedThenPoint = /^\d{1,3}(?:[, '\u00a0\u202f\u2019]\d{3})+(?:\.\d*)?$/;
const groupedThenComma = /^\d{1,3}(?:[. '\u00a0\u202f\u2019]\d{3})+(?:,\d*)?$/;

/**
 * Tells whether a cell is a written number, and by which decimal sign: "1.234,50" is by comma, "1,234.50" by
 * point, "12" by none, "1.234" by either. Undefined for what is no number: text, a code with leading zeros,
 * or more than fifteen digits, which a number here could not keep.
 */
export function decimalSignOf(cell: string): DecimalSign | undefined {
  const bare = bareDigits(cell);
  // A leading zero means a code, a digit must be there, and no double keeps every sixteen-digit whole number.
  if (bare === undefined || /^0\d/.test(bare) || !/\d|^Infinity$/.test(bare) || /^\d{16,}$/.test(bare))
    return undefined;
  if (digits.test(bare) || bare === "Infinity") return "none";
  const asPoint = point.test(bare) || groupedThenPoint.test(bare);
  const asComma = comma.test(bare) || groupedThenComma.test(bare);
  if (asPoint && asComma) return settledBy(bare);
  if (asPoint) return ".";
  return asComma ? "," : undefined;
}

/** "0.123" and "1234.567" cannot be groups of thousands; "1.234" can, and "12 345" has no decimals at all. */
function settledBy(bare: string): DecimalSign {
  if (/^\d{1,3}([ '\u00a0\u202f\u2019]\d{3})+$/.test(bare) || /^\d+e[+-]?\d+$/i.test(bare)) return "none";
  const sign = bare.includes(".") ? "." : ",";
  const canBeGroups = new RegExp(`^[1-9]\\d{0,2}\\${sign}\\d{3}$`).test(bare);
  return canBeGroups ? "either" : sign;
}

/** The number that a cell writes with a decimal sign, or undefined when it writes none so. */
export function writtenNumber(cell: string, decimal: "." | ","): number | undefined {
  const sign = decimalSignOf(cell);
  if (sign === undefined || (sign !== "none" && sign !== "either" && sign !== decimal)) return undefined;
  const separators = decimal === "." ? /[, '\u00a0\u202f\u2019]/g : /[. '\u00a0\u202f\u2019]/g;
  const plain = bareDigits(cell)!.replace(separators, "").replace(",", ".");
  const size = Number(plain);
  if (Number.isNaN(size)) return undefined;
  return isNegative(cell) ? -size : size;
}

/** Credits are written -412.00, 412.00- or (412.00). */
export function isNegative(cell: string): boolean {
  return /^[-\u2212(]|-$/.test(cell.trim());
}

function bareDigits(cell: string): string | undefined {
  const found = signs.exec(cell.trim());
  return found === null ? undefined : (found[1] ?? found[2] ?? found[3])?.trim();
}
