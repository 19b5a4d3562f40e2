import { crossing, narrowed, outward, type Way } from "./profile-bracket.js";
import { type ProfileProblem, type ProfileWalk, profileWalk } from "./profile-walk.js";

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

/** How closely the profile must meet its cut at a limit, as a share of the cut's root. */
const met = 1e-4;
/** Times that a side is walked again from a lower point found at its limit. */
const rounds = 8;

/**
 * Limits of unknown `i` where the profile crosses its cut.
 *
 * On each side the distance is doubled from `spacing` until the cut is passed; the crossing is then found by Newton's
 * iteration on the signed root of the increase, which is nearly a straight line and whose slope the search gives, or by
 * halving, of logarithms where the ends lie far apart. At the limit the fit is done once more from every start: where it
 * comes out lower, the walk goes on from there.
 *
 * @param seeds - points within the cut that were met elsewhere: each is followed outwards.
 * @see Bates, D. M. and Watts, D. G. (1988), Nonlinear Regression Analysis and Its Applications, section 6.1.
 */
export function profileInterval(
  problem: ProfileProblem,
  i: number,
  spacing: number,
  seeds: readonly Float64Array[] = [],
): Profile {
  const walk = profileWalk(problem, i, seeds);
  const down = side(walk, problem, i, -1, spacing);
  const up = side(walk, problem, i, 1, spacing);
  return {
    lower: down.limit,
    upper: up.limit,
    note: [down.note, up.note].filter((text) => text !== "").join("; "),
    firm: down.firm && up.firm,
    trace: walk.points.map(({ value, increase }) => ({ value, increase })),
    inside: walk.points.filter(({ excess }) => excess < 0).map(({ estimates }) => estimates),
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
  const root = Math.sqrt(problem.cut);
  const way: Way = {
    estimate,
    spacing: direction * spacing,
    bound,
    root,
    firm: Math.sqrt(problem.firmCut) - root,
  };
  const found =
    estimate === bound || problem.unbounded[i] === direction ? undefined : limitOn(walk, way, rounds);
  if (found === undefined) {
    const where = Number.isFinite(bound) ? `before the bound ${bound}` : "from this record";
    return { limit: undefined, firm: false, note: `no ${name} limit ${where}` };
  }
  const note = found.firm ? "" : `the ${name} limit is lost at a slightly higher level`;
  return { ...found, note };
}

function limitOn(
  walk: ProfileWalk,
  way: Way,
  left: number,
): { readonly limit: number; readonly firm: boolean } | undefined {
  const reached = outward(walk, way);
  const bracket = reached && narrowed(walk, way, reached);
  if (bracket === undefined) return undefined;
  const { value, inside, outside } = crossing(walk, way, bracket);
  // Where the profile jumps, a search that went astray is looked for just outside, else at the limit itself.
  const jumps = value === inside.value && outside.excess - inside.excess > met * way.root;
  const checked = walk.at(jumps ? outside.value : value, true);
  const isPassed = checked.excess < (jumps ? 0 : -met * way.root);
  if (isPassed && left > 0) return limitOn(walk, way, left - 1);
  return { limit: value, firm: reached!.highest >= way.firm };
}
