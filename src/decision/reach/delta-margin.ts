import { type Fit, problemOf } from "../../estimate/index.js";
import { studentQuantile } from "../../numeric/index.js";
import type { FitGround } from "../../projection/index.js";

/** An interval for a number read off the mean path, by the delta method. */
export interface DeltaMargin {
  readonly standardError: number;
  readonly lower: number;
  readonly upper: number;
}

/**
 * How a number read off the fitted path moves with the unknowns, and the margin that follows: gradient by central
 * differences of a thousandth of a standard error, variance g'Vg, and t(n - p).
 *
 * @returns undefined where the record does not determine an unknown, or the number is not there nearby.
 */
export function deltaMargin(
  fit: Fit,
  ground: FitGround,
  level: number,
  read: (ground: FitGround) => number | undefined,
): DeltaMargin | undefined {
  const { group } = ground;
  const centre = read(ground);
  if (centre === undefined || !problemOf(fit).group(group.group).beginning().fromStart) return undefined;
  const slopes: number[] = [];
  for (let i = 0; i < group.estimates.length; i++) {
    const error = group.estimates[i]!.standardError;
    if (error === undefined) return undefined;
    const step = 1e-3 * error;
    const up = read(moved(ground, i, step));
    const down = read(moved(ground, i, -step));
    if (up === undefined || down === undefined) return undefined;
    slopes.push((up - down) / (2 * step));
  }
  const size = slopes.length;
  let variance = 0;
  for (let a = 0; a < size; a++)
    for (let b = 0; b < size; b++) variance += slopes[a]! * slopes[b]! * group.covariance[a * size + b]!;
  const standardError = Math.sqrt(Math.max(0, variance));
  const half = studentQuantile((1 + level) / 2, group.degreesOfFreedom) * standardError;
  return { standardError, lower: centre - half, upper: centre + half };
}

/** The ground with one unknown moved. */
export function moved(ground: FitGround, unknown: number, by: number): FitGround {
  const place = ground.places[unknown]!;
  const size = ground.parameters.length;
  const parameters = ground.parameters.slice();
  const initial = ground.initial.slice();
  if (place >= size) initial[place - size] = initial[place - size]! + by;
  else if (place >= 0) parameters[place] = parameters[place]! + by;
  return { ...ground, parameters, initial };
}
