import {
  type MinimiseOptions,
  minimiseSquares,
  type RunHooks,
  randomStream,
  squaresWorkspace,
  type Tick,
  ticker,
} from "../../numeric/index.js";
import type { Fit } from "../fit.js";
import { groupError, refuseFewDraws, refuseUnknownName } from "../refusals.js";
import { type RefitProblem, refitProblem } from "../resampling/refit-problem.js";
import { normalErrors, recordMaker } from "../resampling/simulate-record.js";
import type { GroupFit } from "../result/group-fit.js";
import { valueTable } from "../rows/value-table.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import type { Interval } from "./interval.js";

/** Options of `gridInterval`. */
export interface GridIntervalOptions extends RunHooks {
  /** Group of the fit; default its only one. */
  readonly group?: string;
  /** Simulated records at every value tried; default 399. */
  readonly resamples?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
  /** Confidence level of the interval, between 0 and 1; default that of the fit. */
  readonly level?: number;
}

/** Values tried on each side, halving the range that holds the limit each time. */
const halvings = 10;

/**
 * Interval of one parameter by simulation at every value tried: a value belongs to it when the fit's signed root of the
 * rise of the sum of squares is not out of the ordinary among those of records simulated with that value. It keeps its
 * coverage where the rule's slope is near 1 and the usual intervals of one-step fits do not.
 *
 * @param name - a free parameter of the fit.
 * @returns an interval of kind `grid`; a side that no value tried closes is undefined.
 * @throws {ModelError} `unknown-name` | `not-by-least-squares` | `too-few-draws`.
 * @see Hansen, B. E. (1999), The grid bootstrap and the autoregressive model, Review of Economics and Statistics 81:594.
 * @example gridInterval(crowdingFit, "r", { resamples: 49 }).kind; // "grid"
 */
export function gridInterval(fit: Fit, name: string, options: GridIntervalOptions = {}): Interval {
  const { resamples: draws = 399, seed = 1, level = fit.options.level ?? 0.95 } = options;
  if (!(Number.isInteger(draws) && draws >= 20)) throw refuseFewDraws(draws);
  const fitted = groupNamed(fit, options.group);
  const i = fitted.estimates.findIndex((each) => each.name === name);
  if (i < 0)
    throw refuseUnknownName(
      name,
      fitted.estimates.map((each) => each.name),
      "estimated parameter",
    );
  const tick = ticker(options, 2 * (halvings + 2) * draws);
  const ordinary = ordinaryAt(refitProblem(fit, fitted), fitted, i, { draws, seed, tick });
  const tail = (1 - level) / 2;
  const reach = reachOf(fitted, i);
  const lower = limit(fitted.estimates[i]!.value, -reach, (value) => 1 - ordinary(value) >= tail);
  const upper = limit(fitted.estimates[i]!.value, reach, (value) => ordinary(value) >= tail);
  return { kind: "grid", level, lower, upper, note: `${draws} simulated records a value, seed ${seed}` };
}

function groupNamed({ groups }: Fit, name: string | undefined): GroupFit {
  const found = groups.find(
    ({ group }) => group === (name ?? (groups.length === 1 ? groups[0]!.group : undefined)),
  );
  if (found === undefined)
    throw groupError(
      name,
      groups.map(({ group }) => group),
    );
  return found;
}

/** Share of records simulated with unknown i at a value whose signed root lies at or below the fit's own. */
function ordinaryAt(
  problem: RefitProblem,
  fitted: GroupFit,
  i: number,
  { draws, seed, tick }: { readonly draws: number; readonly seed: number; readonly tick: Tick },
): (value: number) => number {
  const { rule, group, unknowns, rows, system, at } = problem;
  const make = recordMaker(rule, group, unknowns, rows, problem.options);
  const workspace = squaresWorkspace(system.size);
  const limits: MinimiseOptions = { lower: unknowns.lower, upper: unknowns.upper, workspace };
  const signedRoot = (start: Float64Array, value: number): number => {
    const free = minimiseSquares(system, start, limits);
    const held = minimiseSquares(system, free.estimates, holding(limits, unknowns, i, value));
    const rise = Math.max(0, held.sumOfSquares - free.sumOfSquares) / free.sumOfSquares;
    return Math.sign(free.estimates[i]! - value) * Math.sqrt(rise * fitted.degreesOfFreedom);
  };
  const recorded = valueTable(rule, group);
  return (value) => {
    rows.take(recorded);
    const own = signedRoot(at, value);
    const held = minimiseSquares(system, at, holding(limits, unknowns, i, value));
    const draw = normalErrors(rows, Math.sqrt(held.sumOfSquares / (fitted.degreesOfFreedom + 1)));
    // The same draws at every value, so that the share changes smoothly with it.
    const stream = randomStream(seed);
    let below = 0;
    for (let k = 0; k < draws; k++) {
      rows.take(make(held.estimates, draw(stream)));
      if (signedRoot(held.estimates, value) <= own) below++;
      tick();
    }
    return below / draws;
  };
}

function holding(limits: MinimiseOptions, unknowns: Unknowns, i: number, value: number): MinimiseOptions {
  const lower = unknowns.lower.slice();
  const upper = unknowns.upper.slice();
  lower[i] = value;
  upper[i] = value;
  return { ...limits, lower, upper };
}

/** A first distance to try: that of the profile's limits, else a tenth of the estimate. */
function reachOf(fitted: GroupFit, i: number): number {
  const { value, profile, standardError } = fitted.estimates[i]!;
  const width = (profile.upper ?? Number.NaN) - (profile.lower ?? Number.NaN);
  return 0.5 * width || 2 * (standardError ?? 0) || 0.1 * Math.abs(value) || 1;
}

/** Where membership ends on one side: doubled out until it does, then halved in. */
function limit(estimate: number, reach: number, belongs: (value: number) => boolean): number | undefined {
  let inside = estimate;
  let outside = estimate + reach;
  for (let k = 0; belongs(outside); k++) {
    if (k === 6) return undefined;
    inside = outside;
    outside = estimate + 2 * (outside - estimate);
  }
  for (let k = 0; k < halvings; k++) {
    const middle = (inside + outside) / 2;
    if (belongs(middle)) inside = middle;
    else outside = middle;
  }
  return (inside + outside) / 2;
}
