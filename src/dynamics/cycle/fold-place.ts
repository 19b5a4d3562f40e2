import type { HeldStep } from "../setting/held-step.js";
import { orbit, slopeAlong } from "./cycle-points.js";

/** A cycle at a value of the parameter that is varied. */
export interface Place {
  readonly points: readonly number[];
  readonly at: number;
}

/** f^p(x) - x and its slope by x, as functions of x and the parameter. */
export function periodGap(
  held: HeldStep,
  slot: number,
  period: number,
): (x: number, at: number) => readonly [number, number] {
  return (x, at) => {
    held.parameters[slot] = at;
    const points = orbit(held, x, period + 1);
    return [points[period]! - x, slopeAlong(held, points.slice(0, period)).slope - 1];
  };
}

/**
 * Where two cycles of a period meet and vanish: solves f^p(x) = x and slope = 1 together for x and the parameter,
 * by Newton's method with central differences, from a cycle near that place.
 */
export function foldPlace(held: HeldStep, slot: number, near: Place): Place | undefined {
  const period = near.points.length;
  const gap = periodGap(held, slot, period);
  let [x, at] = [near.points[0]!, near.at];
  for (let round = 0; round < 60; round++) {
    const [f, g] = gap(x, at);
    const [hx, hr] = [1e-6 * Math.max(Math.abs(x), 1e-6), 1e-6 * Math.max(Math.abs(at), 1e-6)];
    const [xUp, xDown, rUp, rDown] = [gap(x + hx, at), gap(x - hx, at), gap(x, at + hr), gap(x, at - hr)];
    const [fx, gx] = [(xUp[0] - xDown[0]) / (2 * hx), (xUp[1] - xDown[1]) / (2 * hx)];
    const [fr, gr] = [(rUp[0] - rDown[0]) / (2 * hr), (rUp[1] - rDown[1]) / (2 * hr)];
    const determinant = fx * gr - fr * gx;
    const moveX = (f * gr - fr * g) / determinant;
    const moveAt = (fx * g - gx * f) / determinant;
    if (!Number.isFinite(moveX) || !Number.isFinite(moveAt)) return undefined;
    x -= moveX;
    at -= moveAt;
    if (Math.abs(moveAt) <= 1e-14 * Math.abs(at) && Math.abs(moveX) <= 1e-9 * Math.abs(x)) break;
  }
  const [f, g] = gap(x, at);
  const settled = Math.abs(f) <= 1e-9 * Math.max(Math.abs(x), 1e-9) && Math.abs(g) <= 1e-5;
  held.parameters[slot] = at;
  return settled ? { points: orbit(held, x, period), at } : undefined;
}
