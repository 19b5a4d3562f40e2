import { decimalsFor, fixedDecimals } from "../wording/index.js";

/** Beyond this ratio of largest to smallest no number of decimals suits a whole column. */
const maxRatio = 1e5;

/**
 * Common decimals for a column of numbers: enough for the significant digits of the largest and two of the smallest,
 * fewer when all end in zeros.
 *
 * @returns undefined when the numbers differ too much in size; then each has its own decimals.
 */
export function commonDecimals(values: readonly number[], significant: number): number | undefined {
  const sizes = values.filter((value) => Number.isFinite(value) && value !== 0).map(Math.abs);
  const greatest = sizes.reduce((most, size) => Math.max(most, size), 0);
  const least = sizes.reduce((few, size) => Math.min(few, size), Number.POSITIVE_INFINITY);
  if (sizes.length === 0 || greatest >= 1e9 || greatest / least > maxRatio || greatest < 1e-4)
    return undefined;
  const least2 = Math.min(decimalsFor(least, 2), decimalsFor(greatest, significant) + 2);
  const decimals = Math.max(0, decimalsFor(greatest, significant), least2);
  const needed = values
    .filter(Number.isFinite)
    .map((value) => neededDecimals(fixedDecimals(value, decimals)));
  return needed.reduce((most, some) => Math.max(most, some), 0);
}

function neededDecimals(text: string): number {
  return text.split(".")[1]?.replace(/0+$/, "").length ?? 0;
}
