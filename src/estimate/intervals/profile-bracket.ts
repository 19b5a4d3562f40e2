import type { ProfilePoint, ProfileWalk } from "./profile-walk.js";

/** Doublings of the distance from the estimate before a side is called unbounded. */
const doublings = 40;
/** A side whose profile no longer rises by this share over a doubling, several times running, has no limit. */
const flat = 1e-4;
const levelDoublings = 4;
/** Doublings that are made in any case. */
const leastDoublings = 8;
/** Relative precision of a limit, as a share of its distance from the estimate. */
const precision = 1e-9;
/** Values whose ratio is larger are compared on the scale of their logarithms. */
const farApart = 4;
/** Each step towards 0 where the profile is followed there, how many are taken, and what counts as level there. */
const shrink = 0.01;
const shrinks = 10;
const levelStep = 0.01;

/** Careful steps: the first and the least as a share of the distance, how many, and how many times the distance is enough. */
const firstStep = 1e-3;
const leastStep = 1e-6;
const steps = 100;
const farEnough = 256;

/** One side of a profile. */
export interface Way {
  readonly estimate: number;
  /** The first distance, negative downwards. */
  readonly spacing: number;
  readonly bound: number;
  /** Root of the cut, and by how much the root of the firm cut is larger. */
  readonly root: number;
  readonly firm: number;
}

/** Two places between which a profile leaves its cut. */
export interface Bracket {
  readonly inside: ProfilePoint;
  readonly outside: ProfilePoint;
}

/** The bracket of a side, and the highest excess met on or beyond it. */
export interface Reached extends Bracket {
  readonly highest: number;
}

/**
 * The places at doubling distances between which the cut is passed for good, and the highest excess met beyond: until
 * it is firm, the bound is reached, or the profile stays level.
 */
export function outward(walk: ProfileWalk, way: Way): Reached | undefined {
  const met: ProfilePoint[] = [outermost(walk, way)];
  let level = 0;
  for (const { value, made } of placesBeyond(way, met[0]!.value)) {
    const here = walk.at(value);
    level = here.excess - met[met.length - 1]!.excess < flat * way.root ? level + 1 : 0;
    met.push(here);
    if (here.excess >= way.firm || (level >= levelDoublings && made >= leastDoublings)) break;
  }
  return reachedBy(met);
}

/**
 * The places between which the cut is passed, by steps that grow as long as a search can follow them and shrink where
 * it cannot: along a narrow curved valley a doubled distance leads out of it. Undefined where the cut is not passed.
 */
export function carefully(walk: ProfileWalk, way: Way, from: ProfilePoint): Reached | undefined {
  const { estimate, bound, root } = way;
  const direction = Math.sign(way.spacing);
  const first = Math.abs(from.value - estimate);
  const met = [from];
  let step = firstStep * first;
  for (let k = 0; k < steps && !isOver(met, way, first); k++) {
    const here = met[met.length - 1]!;
    const free = here.value + direction * step;
    const next = walk.at(direction > 0 ? Math.min(free, bound) : Math.max(free, bound));
    const isFollowed = next.excess - here.excess < root || step < leastStep * first;
    step *= isFollowed ? 2 : 0.25;
    if (isFollowed) met.push(next);
  }
  return reachedBy(met);
}

/** Whether careful steps have left the cut for good, met the bound, or gone far enough. */
function isOver(met: readonly ProfilePoint[], { estimate, bound, firm }: Way, first: number): boolean {
  const { value, excess } = met[met.length - 1]!;
  return excess >= firm || value === bound || Math.abs(value - estimate) >= farEnough * first;
}

/** The last two neighbours on both sides of the cut; undefined where the last point lies within it. */
function reachedBy(met: readonly ProfilePoint[]): Reached | undefined {
  const last = met.map(({ excess }) => excess < 0).lastIndexOf(true);
  const outside = met[last + 1];
  return outside && { inside: met[last]!, outside, highest: Math.max(...met.map(({ excess }) => excess)) };
}

/** The point within the cut that lies farthest out. */
function outermost({ points }: ProfileWalk, { spacing }: Way): ProfilePoint {
  const inside = points.filter(({ excess }) => excess < 0);
  return spacing > 0 ? inside[inside.length - 1]! : inside[0]!;
}

/** Doubling distances from the estimate, those beyond a value only, up to the bound. */
function placesBeyond(
  { estimate, spacing, bound }: Way,
  inside: number,
): readonly { readonly value: number; readonly made: number }[] {
  const direction = Math.sign(spacing);
  const isShort = (value: number): boolean => (bound - value) * direction > 0;
  const all = Array.from({ length: doublings }, (_, made) => ({
    value: estimate + spacing * 2 ** made,
    made,
  }));
  const open = all.filter(({ value }) => isShort(value) && (value - inside) * direction > 0);
  const end = all.find(({ value }) => !isShort(value));
  return end === undefined ? open : [...open, { ...end, value: bound }];
}

/**
 * A bracket that reaches to 0 or past it, on one side of 0 only: some unknowns lose their meaning at 0 and below,
 * and are to be followed on the scale of their logarithm. Undefined where the profile stays level up to 0.
 */
export function narrowed(walk: ProfileWalk, { root }: Way, bracket: Bracket): Bracket | undefined {
  const { inside, outside } = bracket;
  if (inside.value * outside.value > 0 || inside.value === 0) return bracket;
  const zero = outside.value === 0 ? outside : walk.at(0);
  if (zero.excess < 0) return { inside: zero, outside };
  let here = inside;
  let level = 0;
  for (let k = 1; k <= shrinks && level < 2; k++) {
    const next = walk.at(inside.value * shrink ** k);
    if (next.excess >= 0) return { inside: here, outside: next };
    level = Math.abs(next.excess - here.excess) < levelStep * root ? level + 1 : 0;
    here = next;
  }
  return zero.excess - here.excess < levelStep * root ? { inside: here, outside: zero } : undefined;
}

/** The value at which a profile meets its cut, or at which it jumps over it: then that of the point inside. */
export interface Crossing extends Bracket {
  readonly value: number;
}

/** The value inside a bracket at which the profile meets its cut, by Newton's iteration kept between its ends. */
export function crossing(walk: ProfileWalk, { estimate }: Way, { inside, outside }: Bracket): Crossing {
  const byLogarithm = Math.abs(Math.log(outside.value / inside.value)) > Math.log(farApart);
  let [low, high] = [inside, outside];
  let best = Math.abs(high.excess) < Math.abs(low.excess) ? high : low;
  for (let round = 0; round < 60; round++) {
    const reach = precision * Math.abs(byLogarithm ? best.value : best.value - estimate);
    if (Math.abs(high.value - low.value) <= reach) break;
    const next = between(best, low.value, high.value, byLogarithm);
    if (next.newton && Math.abs(next.value - best.value) <= reach)
      return { value: next.value, inside: low, outside: high };
    best = walk.at(next.value);
    if (best.excess < 0) low = best;
    else high = best;
  }
  return { value: low.value, inside: low, outside: high };
}

/** The next value to try: Newton's where it lies between the ends, else their middle, on the scale that suits. */
function between(
  { value, excess, slope }: ProfilePoint,
  one: number,
  other: number,
  byLogarithm: boolean,
): { readonly value: number; readonly newton: boolean } {
  const newton = byLogarithm ? value * Math.exp(-excess / (slope * value)) : value - excess / slope;
  if ((newton - one) * (newton - other) < 0) return { value: newton, newton: true };
  const middle = byLogarithm ? Math.sign(one) * Math.sqrt(one * other) : (one + other) / 2;
  return { value: middle, newton: false };
}
