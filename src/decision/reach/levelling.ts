import { quantile } from "../../numeric/index.js";
import type { GroupForecast } from "../../projection/index.js";

/** A path whose moves shrink, and are less than this share of itself in the last period, has levelled off. */
const still = 1e-3;

/** The level to which a path tends by the end of its forecast, with the limits of the paths there. */
export function levelling(
  group: GroupForecast,
  place: number,
  level: number,
): { readonly value: number; readonly lower: number; readonly upper: number } | undefined {
  const { central } = group.states[place]!;
  const value = central[central.length - 1]!;
  const before = central[central.length - 2]!;
  const move = Math.abs(value - before);
  // Near an unstable equilibrium moves are small as well, but they grow.
  const shrinks = move === 0 || move < Math.abs(before - central[central.length - 3]!);
  if (!(shrinks && move <= still * Math.abs(value))) return undefined;
  const draws = group.ensemble.mean[place];
  if (draws === undefined) return { value, lower: value, upper: value };
  const rows = group.index.length;
  const ends = Float64Array.from(
    { length: group.ensemble.paths },
    (_, path) => draws[path * rows + rows - 1]!,
  )
    .filter(Number.isFinite)
    .sort();
  return { value, lower: quantile(ends, (1 - level) / 2), upper: quantile(ends, (1 + level) / 2) };
}
