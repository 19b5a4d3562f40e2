import { findRoot } from "../../numeric/index.js";
import type { Rule } from "../../rule/index.js";
import { missingValue, strangeName, unreadableOption } from "../refusals.js";
import { type HeldSetting, type HeldStep, holdStep } from "../setting/held-step.js";
import type { Followed } from "./cycle-points.js";
import { type Exchange, exchangePlace, stableBranch } from "./exchange-place.js";
import { foldPlace } from "./fold-place.js";
import { followCycle, settleInCycle } from "./follow-cycle.js";
import { followEquilibrium } from "./follow-equilibrium.js";

export interface BifurcationsOptions extends HeldSetting {
  /** Parameter that is varied. */
  readonly vary: string;
  /** Values that are followed, from the first to the second, up or down. */
  readonly range: readonly [number, number];
  /**
   * First value from which the cycle to be followed is reached; for a system a value by state, near the
   * equilibrium to be followed.
   */
  readonly initial: number | Readonly<Record<string, number>>;
  /** At most so many bifurcations; default 8. */
  readonly limit?: number;
}

/** A value of a parameter at which what is stable changes. */
export interface Bifurcation {
  /** Value of the parameter. */
  readonly at: number;
  /**
   * `flip`: a cycle of twice the period takes over; `fold`: it meets an unstable one and both vanish;
   * `transcritical`: it meets an unstable one, they exchange stability and both go on; `pitchfork`: it goes on unstable
   * and two stable ones leave it; `neimark-sacker`: turning motion around it takes over (systems and rules with lags).
   */
  readonly kind: "flip" | "fold" | "transcritical" | "pitchfork" | "neimark-sacker";
  /** Period of the cycle that is left. */
  readonly period: number;
  /** Its values there; of a system the value of each state in order. */
  readonly points: readonly number[];
}

export interface Bifurcations {
  readonly kind: "bifurcations";
  readonly rule: Rule;
  readonly vary: string;
  readonly places: readonly Bifurcation[];
  /** Why the following ended: `range` done, `limit` found, or nothing to follow any more. */
  readonly stop: "range" | "limit" | "no-cycle";
}

interface Walk {
  readonly held: HeldStep;
  readonly slot: number;
  readonly to: number;
  /** Typical size of the state. */
  readonly scale: number;
}

/** A place, and where two branches cross what is known of them. */
interface Found {
  readonly place: Bifurcation;
  readonly exchange?: Exchange;
}

interface Here {
  readonly at: number;
  readonly cycle: Followed;
}

function cycleAt({ held, slot }: Walk, at: number, near: readonly number[]): Followed | undefined {
  held.parameters[slot] = at;
  return followCycle(held, near);
}

/** The flip between a stable place and one past it. */
function flipBetween(walk: Walk, before: Here, after: Here): Bifurcation {
  const near = (at: number): readonly number[] => {
    const part = (at - before.at) / (after.at - before.at);
    return before.cycle.points.map((x, i) => x + part * (after.cycle.points[i]! - x));
  };
  const at = findRoot((r) => (cycleAt(walk, r, near(r))?.slope ?? Number.NaN) + 1, before.at, after.at);
  const points = cycleAt(walk, at, near(at))?.points ?? before.cycle.points;
  return { at, kind: "flip", period: points.length, points };
}

type March = { readonly here: Here } | Found | { readonly lost: true };

const shortestStep = (at: number): number => 1e-9 * Math.max(Math.abs(at), 1e-3);

/** Goes on along a cycle by one step; a step in which the cycle is lost is halved until it is known why. */
function march(walk: Walk, here: Here, step: number): March {
  for (let size = step; Math.abs(size) > shortestStep(here.at); size /= 2) {
    const cycle = cycleAt(walk, here.at + size, here.cycle.points);
    if (cycle === undefined || cycle.slope >= 1) continue;
    const next = { at: here.at + size, cycle };
    if (cycle.slope <= -1) return { place: flipBetween(walk, here, next) };
    return { here: next };
  }
  const last = { points: here.cycle.points, at: here.at };
  const exchange = exchangePlace(walk.held, walk.slot, last, walk.scale);
  if (exchange !== undefined) {
    const { at, kind, points } = exchange;
    return { place: { at, kind, period: points.length, points }, exchange };
  }
  const fold = foldPlace(walk.held, walk.slot, last);
  if (fold === undefined) return { lost: true };
  return { place: { at: fold.at, kind: "fold", period: fold.points.length, points: fold.points } };
}

/** The stable cycle a little past a place, on which the walk goes on. */
function beyond(walk: Walk, { place, exchange }: Found, gap: number): Here | undefined {
  const at = place.at + gap;
  walk.held.parameters[walk.slot] = at;
  const cycle =
    exchange?.kind === "transcritical"
      ? stableBranch(walk.held, exchange, gap, walk.scale)
      : settleInCycle(walk.held, place.points[0]! * (1 + 1e-6) + 1e-12);
  if (cycle === undefined || Math.abs(cycle.slope) >= 1) return undefined;
  return { at, cycle };
}

/** The next place on the way, and steps of a size that the way so far calls for. */
function nextPlace(walk: Walk, from: Here, step: number): Found | Bifurcations["stop"] {
  let here = from;
  for (;;) {
    const left = walk.to - here.at;
    // Steps add up to the end of the range but for rounding.
    if (left * Math.sign(step) <= shortestStep(walk.to)) return "range";
    const result = march(walk, here, Math.abs(step) > Math.abs(left) ? left : step);
    if ("lost" in result) return "no-cycle";
    if ("place" in result) return result;
    here = result.here;
  }
}

function follow(walk: Walk, start: Here, limit: number): Pick<Bifurcations, "places" | "stop"> {
  const places: Bifurcation[] = [];
  let step = (walk.to - start.at) / 200;
  for (let here: Here | undefined = start; here !== undefined; ) {
    const found = nextPlace(walk, here, step);
    if (typeof found === "string") return { places, stop: found };
    const { place } = found;
    const last = places.at(-1);
    places.push(place);
    if (places.length >= limit) return { places, stop: "limit" };
    // A cascade shrinks by about 4.669 from one doubling to the next, so steps shrink with it.
    if (last !== undefined && place.kind === "flip") step = (place.at - last.at) / 40;
    here = beyond(walk, found, step);
  }
  return { places, stop: "no-cycle" };
}

/** First values by state: one number serves a rule of one state. */
function startOf(rule: Rule, start: BifurcationsOptions["initial"]): Float64Array {
  if (typeof start === "number") {
    if (rule.states.length > 1) throw unreadableOption("initial", "a value for every state", start);
    return Float64Array.of(start);
  }
  return Float64Array.from(rule.states, (state) => {
    const value = start[state];
    if (value === undefined) throw missingValue("initial value of", state, Object.keys(start));
    return value;
  });
}

function followedCycle(
  walk: Omit<Walk, "scale">,
  from: number,
  start: number,
  limit: number,
): Pick<Bifurcations, "places" | "stop"> {
  const cycle = settleInCycle(walk.held, start);
  if (cycle === undefined) return { places: [], stop: "no-cycle" };
  const sizes = [...cycle.points, start].map(Math.abs);
  const scale = Math.max(...sizes) || Math.max(...walk.held.parameters.map(Math.abs)) || 1;
  return follow({ ...walk, scale }, { at: from, cycle }, limit);
}

/**
 * Follows what is stable while a parameter is varied, and finds where it loses its hold: of a rule of one state, the
 * root of a cycle's multiplier at -1 (period doubling, on to the next cycle) or the meeting of two cycles at +1; of a
 * system or a rule with lags, the root at modulus 1 of a rest level's leading multiplier. Never a place read off a
 * picture.
 *
 * @throws {ModelError} `unknown-name` | `missing-value` | `unreadable-option` | `rule-changes-with-time`.
 * @example bifurcations(recurrence("x[t+1] = r*x*(1 - x)"), { vary: "r", range: [2.8, 3.3], initial: 0.3 }).places[0].at.toFixed(9); // "3.000000000"
 */
export function bifurcations(rule: Rule, options: BifurcationsOptions): Bifurcations {
  const { vary, range, limit = 8 } = options;
  const [from, to] = range;
  const slot = rule.parameters.indexOf(vary);
  if (slot < 0) throw strangeName("parameter", vary, rule.parameters);
  if (!Number.isFinite(from) || !Number.isFinite(to) || from === to) {
    throw unreadableOption("range", "two different finite numbers, as in [2.8, 3.3]", range);
  }
  const setting = { ...options, parameters: { ...options.parameters, [vary]: from } };
  const held = holdStep(rule, setting, "bifurcation");
  const start = startOf(rule, options.initial);
  const found =
    held.width === 1
      ? followedCycle({ held, slot, to }, from, start[0]!, limit)
      : followEquilibrium(held, slot, { from, to }, start, limit);
  return {
    kind: "bifurcations",
    rule,
    vary,
    places: found.places,
    stop: found.stop,
  };
}
