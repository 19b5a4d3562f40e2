import type { HeldStep } from "../setting/held-step.js";
import { orbit } from "./cycle-points.js";

/**
 * Where two cycles of a period meet and vanish: solves f^p(x) = x and slope = 1 together for x and the parameter,
 * by Newton's method with central differences, from a cycle near that place.
 */
export function foldPlace(
  held: HeldStep,
  slot: number,
  near: { readonly points: readonly number[]; readonly at: number },
): { readonly points: readonly number[]; readonly at: number } | undefined {
  const period = near.points.length;
  const gaps = (x: number, at: number): readonly [number, number] => {
    held.parameters[slot] = at;
    const state = Float64Array.of(x);
    let slope = 1;
    let value = x;
    for (let k = 0; k < period; k++) {
      state[0] = value;
      const { next, matrix } = held.slopes(state);
      slope *= matrix[0]!;
      value = next[0]!;
    }
    return [value - x, slope - 1];
  };
  let [x, at] = [near.points[0]!, near.at];
  for (let round = 0; round < 60; round++) {
    const [f, g] = gaps(x, at);
    const [hx, hr] = [1e-6 * Math.max(Math.abs(x), 1e-6), 1e-6 * Math.max(Math.abs(at), 1e-6)];
    const [xUp, xDown, rUp, rDown] = [gaps(x + hx, at), gaps(x - hx, at), gaps(x, at + hr), gaps(x, at - hr)];
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
  const [f, g] = gaps(x, at);
  const settled = Math.abs(f) <= 1e-9 * Math.max(Math.abs(x), 1e-9) && Math.abs(g) <= 1e-5;
  held.parameters[slot] = at;
  return settled ? { points: orbit(held, x, period), at } : undefined;
}
