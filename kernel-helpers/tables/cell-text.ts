import {
  decimalsFor,
  fixedDecimals,
  formatDigits,
  minorUnits,
  type NumberFormat,
  percent,
  powerOfTen,
  significant,
} from "../wording/index.js";
import type { Column } from "./table.js";

/** Shown for a missing value. */
export const missingMark = "–";

type Row = Readonly<Record<string, unknown>>;

/**
 * A cell as text, by the kind of its column and its significant digits.
 *
 * @param decimals - common decimals of a column of plain numbers.
 * @returns text with "-" for minus; `absent` for undefined, null and NaN.
 */
export function cellText(column: Column, row: Row, signs: NumberFormat, decimals?: number): string {
  const format = columnFormat(column, signs);
  const value = row[column.key];
  if (value === undefined || value === null || Number.isNaN(value)) return missingMark;
  if (typeof value === "bigint") return formatDigits(wholeText(column, value, format), format);
  if (typeof value === "number" && Number.isFinite(value) && decimals !== undefined) {
    return formatDigits(fixedDecimals(value, decimals), format);
  }
  if (typeof value === "number") return numberText(column, value, row, format);
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (value instanceof Date) return value.toISOString().slice(0, 10);
  if (column.kind === "money" && /^-?\d+(\.\d+)?$/.test(String(value)))
    return formatDigits(String(value), format);
  return String(value);
}

function columnFormat({ grouped = true }: Column, format: NumberFormat): NumberFormat {
  return grouped ? format : { ...format, group: "" };
}

function wholeText(column: Column, value: bigint, format: NumberFormat): string {
  return column.kind === "money" ? minorUnits(value, column.digits ?? format.minorDigits) : value.toString();
}

function numberText(column: Column, value: number, row: Row, format: NumberFormat): string {
  if (!Number.isFinite(value)) return value > 0 ? "∞" : "-∞";
  switch (column.kind) {
    case "text":
      return String(value);
    case "integer":
      return formatDigits(fixedDecimals(value, Number.isInteger(value) ? 0 : 6), format);
    case "number":
      return significant(value, column.digits ?? 4, format);
    case "estimate":
      return estimateText(column, value, row, format);
    case "money":
      return formatDigits(fixedDecimals(value, column.digits ?? format.minorDigits), format);
    case "percent":
      return percent(value, column.digits ?? 1, format);
    case "probability":
      return probabilityText(column, value, row, format);
  }
}

function estimateText(column: Column, value: number, row: Row, format: NumberFormat): string {
  const error = positive(row[column.pairedWith ?? column.key]);
  if (error === undefined) return significant(value, column.digits ?? 3, format);
  const decimals = decimalsFor(error, 2);
  // A standard error of 0.0000012 would put a row of zeros in front of the significant digits.
  if (decimals > 8 || decimals < -6)
    return powerOfTen(value, Math.max(0, exponentOf(value) + decimals), format);
  return formatDigits(fixedDecimals(value, decimals), format);
}

function probabilityText(column: Column, value: number, row: Row, format: NumberFormat): string {
  const error = column.pairedWith === undefined ? undefined : positive(row[column.pairedWith]);
  const decimals =
    error === undefined ? (column.digits ?? 3) : Math.max(1, Math.min(6, decimalsFor(error, 1)));
  const least = 10 ** -decimals;
  if (value > 0 && value < least) return `<${formatDigits(fixedDecimals(least, decimals), format)}`;
  if (value < 1 && value > 1 - least) return `>${formatDigits(fixedDecimals(1 - least, decimals), format)}`;
  return formatDigits(fixedDecimals(value, decimals), format);
}

function exponentOf(value: number): number {
  return value === 0 ? 0 : Math.floor(Math.log10(Math.abs(value)));
}

function positive(value: unknown): number | undefined {
  return typeof value === "number" && Number.isFinite(value) && value > 0 ? value : undefined;
}
