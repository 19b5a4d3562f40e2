import type { HeldStep } from "../setting/held-step.js";
import { type Followed, orbit, polishCycle, slopeAlong } from "./cycle-points.js";
import { type Place, periodGap } from "./fold-place.js";

/** Where the branch that is followed passes slope 1 and goes on. */
export interface Exchange extends Place {
  /** `transcritical`: another branch crosses it there; `pitchfork`: two others leave it there. */
  readonly kind: "transcritical" | "pitchfork";
  /** Change of the first point with the parameter along both branches of a transcritical place. */
  readonly branches: readonly number[];
}

/** Derivatives of g(x, r) = f^p(x) - x at a place, by central differences of g and of its exact slope. */
interface Derivatives {
  readonly g: number;
  readonly slope: number;
  readonly byParameter: number;
  readonly xx: number;
  readonly xr: number;
  readonly rr: number;
}

/**
 * Looks for the place at which two branches of cycles cross, from a cycle near it: there both derivatives of
 * g(x, r) = f^p(x) - x vanish together with g, while at a fold the one by r does not.
 *
 * @param scale - typical size of the state.
 * @see Kuznetsov (2004), Elements of Applied Bifurcation Theory, 3rd ed., section 7.4 (branching points).
 */
export function exchangePlace(
  held: HeldStep,
  slot: number,
  near: Place,
  scale: number,
): Exchange | undefined {
  const period = near.points.length;
  const gap = periodGap(held, slot, period);
  const hx = 1e-5 * scale;
  const hr = 1e-5 * (Math.abs(near.at) || 1);
  const derivativesAt = (x: number, at: number): Derivatives => {
    const [g, slope] = gap(x, at);
    const [up, down] = [gap(x, at + hr), gap(x, at - hr)];
    return {
      g,
      slope,
      byParameter: (up[0] - down[0]) / (2 * hr),
      xx: (gap(x + hx, at)[1] - gap(x - hx, at)[1]) / (2 * hx),
      xr: (up[1] - down[1]) / (2 * hr),
      rr: (up[0] - 2 * g + down[0]) / (hr * hr),
    };
  };
  const place = crossingNear(derivativesAt, near, scale);
  if (place === undefined) return undefined;
  const { at } = place;
  const x = Math.abs(place.x) < 1e-8 * scale && gap(0, at)[0] === 0 ? 0 : place.x;
  const found = derivativesAt(x, at);
  const isHere = Math.abs(at - near.at) <= 1e-6 * Math.max(Math.abs(near.at), 1e-3);
  const kind = isHere && Math.abs(found.g) <= 1e-9 * scale ? kindOf(gap, x, at, scale) : undefined;
  held.parameters[slot] = at;
  return kind && { at, kind, points: orbit(held, x, period), branches: branchesOf(found) };
}

/** Newton's method for the place at which the slope and the derivative by the parameter vanish together. */
function crossingNear(
  derivativesAt: (x: number, at: number) => Derivatives,
  near: Place,
  scale: number,
): { readonly x: number; readonly at: number } | undefined {
  let [x, at] = [near.points[0]!, near.at];
  for (let round = 0; round < 30; round++) {
    const { slope, byParameter, xx, xr, rr } = derivativesAt(x, at);
    const determinant = xx * rr - xr * xr;
    const moveX = (slope * rr - xr * byParameter) / determinant;
    const moveAt = (xx * byParameter - xr * slope) / determinant;
    if (!Number.isFinite(moveX) || !Number.isFinite(moveAt)) return undefined;
    x -= moveX;
    at -= moveAt;
    if (Math.abs(moveAt) <= 1e-13 * Math.abs(at) && Math.abs(moveX) <= 1e-11 * scale) break;
  }
  return { x, at };
}

/** Whether the slope changes along x in the first order, or only in the second, as a symmetric rule has it. */
function kindOf(
  gap: ReturnType<typeof periodGap>,
  x: number,
  at: number,
  scale: number,
): Exchange["kind"] | undefined {
  const away = 1e-3 * scale;
  const [above, below, here] = [gap(x + away, at)[1], gap(x - away, at)[1], gap(x, at)[1]];
  const [first, second] = [Math.abs(above - below), Math.abs(above + below - 2 * here)];
  // A step that is linear in x has no other branch to exchange with.
  if (!(Math.max(first, second) > 1e-12)) return undefined;
  return first > second ? "transcritical" : "pitchfork";
}

/** Roots m of g_xx m^2 + 2 g_xr m + g_rr = 0. */
function branchesOf({ xx, xr, rr }: Derivatives): readonly number[] {
  const root = Math.sqrt(Math.max(xr * xr - xx * rr, 0));
  const far = -(xr + (xr < 0 ? -root : root));
  return [far / xx, rr / far];
}

/** The stable cycle a little past a transcritical place: that of the branch which took over. */
export function stableBranch(
  held: HeldStep,
  { points, branches }: Exchange,
  step: number,
  scale: number,
): Followed | undefined {
  const reach = Math.abs((branches[0]! - branches[1]!) * step);
  for (const branch of branches) {
    const expected = points[0]! + branch * step;
    const found = polishCycle(held, orbit(held, expected, points.length));
    const { slope, residual } = slopeAlong(held, found);
    const arrived = residual <= 1e-11 * scale && Math.abs(found[0]! - expected) < 0.5 * reach;
    if (arrived && Math.abs(slope) < 1) return { points: found, slope };
  }
  return undefined;
}
