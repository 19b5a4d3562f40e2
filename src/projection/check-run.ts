import { refuseLevel, refusePaths, refusePeriods } from "./refusals.js";

/** Most values of drawn paths that are kept beside their bands: 40 MB. */
export const keepLimit = 5_000_000;

/** Refuses counts and levels that mean nothing. */
export function checkRun(periods: number, paths: number, levels: readonly number[]): void {
  if (!Number.isSafeInteger(periods) || periods < 1) throw refusePeriods(periods);
  if (!Number.isSafeInteger(paths) || paths < 1) throw refusePaths(paths);
  const bad = levels.find((level) => !(level > 0 && level < 1));
  if (bad !== undefined) throw refuseLevel(bad);
}
