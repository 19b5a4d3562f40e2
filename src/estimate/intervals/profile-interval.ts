import { type Crossing, carefully, crossing, narrowed, outward, type Way } from "./profile-bracket.js";
import { type ProfilePoint, type ProfileProblem, type ProfileWalk, profileWalk } from "./profile-walk.js";

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
/** A rise over half the way to a jump that makes it a limit, as a share of the cut's root. */
const level = 0.01;
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
  const { estimates, variance, separable } = problem;
  if (variance === 0 && separable[i]) return exactly(estimates[i]!);
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

/** A record without scatter leaves no other value, and so no interval. */
function exactly(value: number): Profile {
  const note = "the record does not scatter about the rule";
  const limits = { lower: undefined, upper: undefined, note, firm: true };
  return { ...limits, trace: [{ value, increase: 0 }], inside: [], better: undefined };
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
    estimate === bound || problem.unbounded[i] === direction
      ? undefined
      : limitOn(walk, way, problem.separable[i]!);
  if (found === undefined) {
    const where = Number.isFinite(bound) ? `before the bound ${bound}` : "from this record";
    return { limit: undefined, firm: false, note: `no ${name} limit ${where}` };
  }
  const note = found.firm ? "" : `the ${name} limit is lost at a slightly higher level`;
  return { ...found, note };
}

/** The limit on one side; undefined where there is none. */
function limitOn(
  walk: ProfileWalk,
  way: Way,
  jumpsCount: boolean,
): { readonly limit: number; readonly firm: boolean } | undefined {
  let reached = outward(walk, way);
  for (let round = 0; reached !== undefined; round++) {
    const bracket = narrowed(walk, way, reached);
    if (bracket === undefined) return undefined;
    const end = endOf(walk, way, crossing(walk, way, bracket));
    if (!end.isPassed || round === rounds)
      return isTelling(walk, way, end, jumpsCount)
        ? { limit: end.value, firm: reached.highest >= way.firm }
        : undefined;
    reached = end.jumps ? carefully(walk, way, end.checked) : outward(walk, way);
  }
  return undefined;
}

/** Where a profile leaves its cut, and the point at which that was checked. */
interface End {
  readonly value: number;
  readonly inside: ProfilePoint;
  readonly outside: ProfilePoint;
  readonly checked: ProfilePoint;
  /** Whether the profile jumps over its cut there, as where the rule breaks down. */
  readonly jumps: boolean;
  /** Whether the check came out lower, so that the profile goes on. */
  readonly isPassed: boolean;
}

/** Where the profile jumps, a search that went astray is looked for just outside, else at the limit itself. */
function endOf(walk: ProfileWalk, { root }: Way, { value, inside, outside }: Crossing): End {
  const jumps = value === inside.value && outside.excess - inside.excess > met * root;
  const checked = walk.at(jumps ? outside.value : value, true);
  return { value, inside, outside, checked, jumps, isPassed: checked.excess < (jumps ? 0 : -met * root) };
}

/**
 * Whether an end is a limit. A jump of an unknown that others make up for says only that the search could not follow
 * them, one from a level stretch that numbers became too large, and a rise because another unknown was stopped short says
 * nothing either.
 */
function isTelling(
  walk: ProfileWalk,
  { estimate, root }: Way,
  { value, outside, jumps, inside }: End,
  jumpsCount: boolean,
): boolean {
  if (outside.isHeldBack) return false;
  if (!jumps) return true;
  const halfway = walk.at((estimate + value) / 2);
  return jumpsCount && inside.excess - halfway.excess > level * root;
}
