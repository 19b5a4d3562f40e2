import { type RunHooks, randomStream, type Tick, ticker } from "../../numeric/index.js";
import { fewDrawsError, groupError, notBySquaresError, unknownNameError } from "../errors.js";
import { type Fit, problemOf } from "../fit.js";
import type { RecordDraw, Refitter } from "../problem/refitter.js";
import type { GroupFit } from "../result/group-fit.js";
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
  const { resamples: draws = 399, seed = 1, level = problemOf(fit).level } = options;
  if (!(Number.isInteger(draws) && draws >= 20)) throw fewDrawsError(draws);
  const fitted = groupNamed(fit, options.group);
  const i = fitted.estimates.findIndex((each) => each.name === name);
  if (i < 0)
    throw unknownNameError(
      name,
      fitted.estimates.map((each) => each.name),
      "estimated parameter",
    );
  const group = problemOf(fit).group(fitted.group);
  const again = group.kind === "least-squares" ? group.refitter() : undefined;
  if (again?.draw === undefined) throw notBySquaresError("gridInterval");
  const tick = ticker(options, 2 * (halvings + 2) * draws);
  const ordinary = ordinaryAt(again, again.draw, fitted, i, { draws, seed, tick });
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
  { take, minimise, minimiseHeld, recorded, at }: Refitter,
  draw: RecordDraw,
  fitted: GroupFit,
  i: number,
  { draws, seed, tick }: { readonly draws: number; readonly seed: number; readonly tick: Tick },
): (value: number) => number {
  const signedRoot = (start: Float64Array, value: number): number => {
    const free = minimise(start);
    const held = minimiseHeld(free.estimates, i, value);
    const rise = Math.max(0, held.value - free.value) / free.value;
    return Math.sign(free.estimates[i]! - value) * Math.sqrt(rise * fitted.degreesOfFreedom);
  };
  return (value) => {
    take(recorded);
    const own = signedRoot(at, value);
    const held = minimiseHeld(at, i, value);
    const sigma = Math.sqrt(held.value / (fitted.degreesOfFreedom + 1));
    // The same draws at every value, so that the share changes smoothly with it.
    const stream = randomStream(seed);
    let below = 0;
    for (let k = 0; k < draws; k++) {
      if (draw(stream, { at: held.estimates, sigma }) && signedRoot(held.estimates, value) <= own) below++;
      tick();
    }
    return below / draws;
  };
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
