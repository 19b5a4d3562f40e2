import type { HeldStep } from "../setting/held-step.js";
import { type Followed, orbit, polishCycle, slopeAlong } from "./cycle-points.js";

const longestPeriod = 128;

/** The cycle near given points at the parameters as they are now; undefined where it is gone. */
export function followCycle(held: HeldStep, near: readonly number[]): Followed | undefined {
  const points = polishCycle(held, near);
  const { slope, residual } = slopeAlong(held, points);
  const scale = Math.max(...points.map(Math.abs), 1e-300);
  const jumped = points.some((x, i) => Math.abs(x - near[i]!) > 0.2 * scale);
  return residual <= 1e-11 * scale && !jumped ? { points, slope } : undefined;
}

/** The smallest number of steps after which an orbit comes back, looked for in its last values. */
function periodOf(values: readonly number[]): number | undefined {
  const scale = Math.max(...values.map(Math.abs), 1e-300);
  const comesBack = (period: number): boolean =>
    values.slice(period).every((value, i) => Math.abs(value - values[i]!) <= 1e-6 * scale);
  for (let period = 1; period <= longestPeriod; period++) if (comesBack(period)) return period;
  return undefined;
}

/** The cycle in which a start ends up, by stepping long; undefined where it settles in none. */
export function settleInCycle(held: HeldStep, start: number): Followed | undefined {
  const state = Float64Array.of(start);
  for (let k = 0; k < 30_000; k++) held.step(state, state);
  if (!Number.isFinite(state[0]!)) return undefined;
  const period = periodOf(orbit(held, state[0]!, 2 * longestPeriod));
  return period === undefined ? undefined : followCycle(held, orbit(held, state[0]!, period));
}
