import { decimalsFor, fixedDecimals } from "../wording/index.js";

/** Beyond this ratio of greatest to least a column of numbers has no number of decimals that suits all. */
const spread = 1e5;

/**
 * Decimals for a column of numbers of one kind, so that they can be compared at a glance: as many as leave the
 * greatest its significant digits and the least two, fewer when all of them end in zeros.
 *
 * @returns undefined when the numbers are too far apart: then each is written by itself.
 */
export function commonDecimals(values: readonly number[], significant: number): number | undefined {
  const sizes = values.filter((value) => Number.isFinite(value) && value !== 0).map(Math.abs);
  const greatest = sizes.reduce((most, size) => Math.max(most, size), 0);
  const least = sizes.reduce((few, size) => Math.min(few, size), Number.POSITIVE_INFINITY);
  if (sizes.length === 0 || greatest >= 1e9 || greatest / least > spread || greatest < 1e-4) return undefined;
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
