import { type Excess, type ProfileProblem, type ProfileWalk, profileWalk } from "./profile-walk.js";

/** A profile: its limits, and the places it was computed at for a plot. */
export interface Profile {
  /** Undefined on a side where the record gives no limit; `note` says why. */
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  readonly note: string;
  /** Whether the profile passes the firm cut on both sides. */
  readonly firm: boolean;
  /** By increasing value of the unknown: the increase, the other unknowns at their best. */
  readonly trace: readonly { readonly value: number; readonly increase: number }[];
  /** Points met on the way that lie within the cut. */
  readonly inside: readonly Float64Array[];
  /** A better optimum met on the way, from which the fit must be done again. */
  readonly better: Float64Array | undefined;
}

/** Doublings of the distance from the estimate before a side is called unbounded. */
const doublings = 40;
/** A side whose profile no longer rises by this share over a doubling, several times running, has no limit. */
const flat = 1e-4;
/** Relative precision of a limit, as a share of its distance from the estimate. */
const precision = 1e-9;

/**
 * Limits of unknown `i` where the profile crosses its cut.
 *
 * On each side the distance is doubled from `spacing` until the cut is passed; the crossing is then found by Newton's
 * iteration on the signed root of the increase, which is nearly a straight line and whose slope the search gives.
 *
 * @see Bates, D. M. and Watts, D. G. (1988), Nonlinear Regression Analysis and Its Applications, section 6.1.
 */
export function profileInterval(problem: ProfileProblem, i: number, spacing: number): Profile {
  const walk = profileWalk(problem, i);
  const down = side(walk, problem, i, -1, spacing);
  const up = side(walk, problem, i, 1, spacing);
  const trace = [...walk.trace, { value: problem.estimates[i]!, increase: 0 }].sort(
    (a, b) => a.value - b.value,
  );
  const note = [down.note, up.note].filter((text) => text !== "").join("; ");
  return {
    lower: down.limit,
    upper: up.limit,
    note,
    firm: down.firm && up.firm,
    trace,
    inside: walk.inside,
    better: walk.better(),
  };
}

interface Side {
  readonly limit: number | undefined;
  readonly firm: boolean;
  readonly note: string;
}

function side(
  walk: ProfileWalk,
  problem: ProfileProblem,
  i: number,
  direction: 1 | -1,
  spacing: number,
): Side {
  const estimate = problem.estimates[i]!;
  const bound = direction > 0 ? problem.upper[i]! : problem.lower[i]!;
  const name = direction > 0 ? "upper" : "lower";
  const none = (note: string): Side => ({ limit: undefined, firm: false, note });
  if (estimate === bound) return none(`no ${name} limit before the bound ${bound}`);
  walk.restart();
  const root = Math.sqrt(problem.cut);
  const firm = Math.sqrt(problem.firmCut) - root;
  const places = outward(walk, estimate, direction * spacing, bound, firm, root);
  const outside = places.findIndex((place) => place.excess >= 0);
  if (outside < 0)
    return none(
      Number.isFinite(bound)
        ? `no ${name} limit before the bound ${bound}`
        : `no ${name} limit from this record`,
    );
  const inside = places[outside - 1] ?? { value: estimate, excess: -root, slope: 0 };
  const passed = places[places.length - 1]!.excess >= firm;
  const limit = crossing(walk, estimate, inside, places[outside]!);
  return { limit, firm: passed, note: passed ? "" : `the ${name} limit is lost at a slightly higher level` };
}

/** Places at doubling distances, until the excess is firm, the bound is reached, or the profile stays level. */
function outward(
  walk: ProfileWalk,
  estimate: number,
  spacing: number,
  bound: number,
  firm: number,
  root: number,
): readonly Excess[] {
  const places: Excess[] = [];
  let before = -root;
  let level = 0;
  for (let k = 0; k < doublings && !(level >= 4 && k >= 8); k++) {
    const free = estimate + spacing * 2 ** k;
    const here = walk.at(spacing > 0 ? Math.min(free, bound) : Math.max(free, bound));
    places.push(here);
    if (here.excess >= firm || here.value === bound) break;
    level = here.excess - before < flat * root ? level + 1 : 0;
    before = here.excess;
  }
  return places;
}

/** The value between `inside` and `outside` at which the profile meets its cut: Newton's iteration, kept between. */
function crossing(walk: ProfileWalk, estimate: number, inside: Excess, outside: Excess): number {
  let low = inside;
  let high = outside;
  let best = Math.abs(high.excess) < Math.abs(low.excess) ? high : low;
  for (let round = 0; round < 60; round++) {
    const close = precision * Math.abs(best.value - estimate);
    if (Math.abs(high.value - low.value) <= close) break;
    const newton = best.value - best.excess / best.slope;
    const within = (newton - low.value) * (newton - high.value) < 0;
    if (within && Math.abs(newton - best.value) <= close) return newton;
    best = walk.at(within ? newton : (low.value + high.value) / 2);
    if (best.excess < 0) low = best;
    else high = best;
  }
  return best.value;
}
