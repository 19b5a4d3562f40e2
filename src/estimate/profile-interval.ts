import type { LinearisedSystem } from "../numeric/index.js";
import { findRoot, minimiseSquares } from "../numeric/index.js";
import type { Interval } from "./interval.js";

/** What a profile starts from: the optimum, and where its cut lies. */
export interface ProfileProblem {
  readonly system: LinearisedSystem;
  readonly estimates: Float64Array;
  readonly sumOfSquares: number;
  readonly lower: Float64Array;
  readonly upper: Float64Array;
  /** sigma^2 by the fit's convention. */
  readonly variance: number;
  /** Critical value of (RSS(value) - RSS) / sigma^2. */
  readonly cut: number;
  readonly level: number;
}

/** A profile: its limits, and the places it was computed at for a plot. */
export interface Profile {
  readonly interval: Interval;
  /** By increasing value: (RSS(value) - RSS) / sigma^2, the other unknowns at their best. */
  readonly trace: readonly { readonly value: number; readonly increase: number }[];
  /** A better optimum met on the way, from which the fit must be done again. */
  readonly better: Float64Array | undefined;
}

/** Doublings of the distance from the estimate before a side is called unbounded. */
const doublings = 40;
/** A side whose profile no longer rises by this share over a doubling, several times running, has no limit. */
const flat = 1e-4;

/**
 * Limits of unknown `i` where the profile of the sum of squares crosses its cut.
 *
 * On each side the distance is doubled from `spacing` until the cut is passed, then the crossing is solved on
 * the signed root of the increase, which is nearly a straight line.
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
    interval: { kind: "profile", level: problem.level, lower: down.limit, upper: up.limit, note },
    trace,
    better: walk.better(),
  };
}

interface Walk {
  /** Root of the increase minus root of the cut, at a value; infinite where the rule breaks down. */
  readonly excess: (value: number) => number;
  readonly restart: () => void;
  readonly trace: { value: number; increase: number }[];
  readonly better: () => Float64Array | undefined;
}

/** Refits with unknown i held, each time from the optimum at the value before. */
function profileWalk(problem: ProfileProblem, i: number): Walk {
  const { system, estimates, sumOfSquares, variance, cut } = problem;
  const lower = problem.lower.slice();
  const upper = problem.upper.slice();
  let from = estimates.slice();
  const trace: { value: number; increase: number }[] = [];
  let better: Float64Array | undefined;
  return {
    trace,
    better: () => better,
    restart: () => {
      from = estimates.slice();
    },
    excess(value) {
      lower[i] = value;
      upper[i] = value;
      from[i] = value;
      const held = minimiseSquares(system, from, { lower, upper });
      if (!Number.isFinite(held.sumOfSquares)) return Number.POSITIVE_INFINITY;
      from = Float64Array.from(held.estimates);
      const rise = held.sumOfSquares - sumOfSquares;
      if (rise < -1e-6 * sumOfSquares) better = from.slice();
      const increase = Math.max(0, rise) / variance;
      trace.push({ value, increase });
      return Math.sqrt(increase) - Math.sqrt(cut);
    },
  };
}

function side(
  walk: Walk,
  problem: ProfileProblem,
  i: number,
  direction: 1 | -1,
  spacing: number,
): { limit: number | undefined; note: string } {
  const estimate = problem.estimates[i]!;
  const bound = direction > 0 ? problem.upper[i]! : problem.lower[i]!;
  const name = direction > 0 ? "upper" : "lower";
  walk.restart();
  let inside = estimate;
  let before = -Math.sqrt(problem.cut);
  let level = 0;
  for (let k = 0; k < doublings && level < 4; k++) {
    const step = Math.min(spacing * 2 ** k, Math.abs(bound - estimate));
    const value = estimate + direction * step;
    const excess = walk.excess(value);
    if (excess >= 0) return { limit: crossing(walk, inside, value), note: "" };
    if (value === bound) return { limit: undefined, note: `no ${name} limit before the bound ${bound}` };
    level = excess - before < flat * Math.sqrt(problem.cut) ? level + 1 : 0;
    inside = value;
    before = excess;
  }
  return { limit: undefined, note: `no ${name} limit from this record` };
}

/** The value between `inside` and `outside` at which the profile meets its cut. */
function crossing(walk: Walk, inside: number, outside: number): number {
  return findRoot((value) => Math.min(walk.excess(value), 1e6), inside, outside);
}
