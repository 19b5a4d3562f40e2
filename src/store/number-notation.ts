/** Decimal sign of a number as written, as far as it can be recognised. */
export type DecimalSign = "." | "," | "either" | "none";

const signs = /^\((.+)\)$|^(.+)-$|^[+\-\u2212]?\s*(.+)$/;
const digits = /^\d+$/;
const point = /^\d*\.\d*$|^\d+\.?\d*e[+-]?\d+$/i;
const comma = /^\d*,\d*$|^\d+,?\d*e[+-]?\d+$/i;
const groupedThenPoint = /^\d{1,3}(?:[, '\u00a0\u202f\u2019]\d{3})+(?:\.\d*)?$/;
const groupedThenComma = /^\d{1,3}(?:[. '\u00a0\u202f\u2019]\d{3})+(?:,\d*)?$/;

/**
 * Decimal sign of a cell that is a number: comma in "1.234,50", point in "1,234.50", none in "12", either in "1.234".
 * Undefined for anything else: text, a code with leading zeros, more than fifteen digits, which a double cannot hold.
 */
export function decimalSignOf(cell: string): DecimalSign | undefined {
  const unsigned = unsignedText(cell);
  // A leading zero means a code, at least one digit is required, and doubles do not hold every sixteen-digit integer.
  if (
    unsigned === undefined ||
    /^0\d/.test(unsigned) ||
    !/\d|^Infinity$/.test(unsigned) ||
    /^\d{16,}$/.test(unsigned)
  )
    return undefined;
  if (digits.test(unsigned) || unsigned === "Infinity") return "none";
  const asPoint = point.test(unsigned) || groupedThenPoint.test(unsigned);
  const asComma = comma.test(unsigned) || groupedThenComma.test(unsigned);
  if (asPoint && asComma) return resolvedSign(unsigned);
  if (asPoint) return ".";
  return asComma ? "," : undefined;
}

/** "0.123" and "1234.567" cannot be thousands groups; "1.234" can, and "12 345" has no decimals. */
function resolvedSign(unsigned: string): DecimalSign {
  if (/^\d{1,3}([ '\u00a0\u202f\u2019]\d{3})+$/.test(unsigned) || /^\d+e[+-]?\d+$/i.test(unsigned))
    return "none";
  const sign = unsigned.includes(".") ? "." : ",";
  const canBeGroups = new RegExp(`^[1-9]\\d{0,2}\\${sign}\\d{3}$`).test(unsigned);
  return canBeGroups ? "either" : sign;
}

/** The number in a cell, read with a decimal sign; undefined when it is not one. */
export function parseNumber(cell: string, decimal: "." | ","): number | undefined {
  const sign = decimalSignOf(cell);
  if (sign === undefined || (sign !== "none" && sign !== "either" && sign !== decimal)) return undefined;
  const separators = decimal === "." ? /[, '\u00a0\u202f\u2019]/g : /[. '\u00a0\u202f\u2019]/g;
  const plain = unsignedText(cell)!.replace(separators, "").replace(",", ".");
  const size = Number(plain);
  if (Number.isNaN(size)) return undefined;
  return isNegative(cell) ? -size : size;
}

/** Credits are written -412.00, 412.00- or (412.00). */
export function isNegative(cell: string): boolean {
  return /^[-\u2212(]|-$/.test(cell.trim());
}

function unsignedText(cell: string): string | undefined {
  const found = signs.exec(cell.trim());
  return found === null ? undefined : (found[1] ?? found[2] ?? found[3])?.trim();
}
