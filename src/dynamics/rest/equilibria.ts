import { encloseStep, type Interval, type Rule } from "../../rule/index.js";
import { type HeldSetting, type HeldStep, holdStep, settled } from "../setting/held-step.js";
import { type SearchRange, searchRanges } from "../setting/search-range.js";
import { enclosedRoots } from "./enclosed-roots.js";
import { type Multiplier, multipliersOf } from "./multiplier.js";
import { settleByNewton } from "./settle-by-newton.js";
import { spreadPoints } from "./spread-points.js";
import { type Stability, stabilityOf } from "./stability.js";

/** Values that the rule leaves as they are. */
export interface Equilibrium extends Stability {
  /** By state. */
  readonly at: Readonly<Record<string, number>>;
  /** Largest |next - present| over the states, in the unit of the state. */
  readonly residual: number;
  /** Of the linearised step, largest modulus first; one for a single state without lags. */
  readonly multipliers: readonly Multiplier[];
  /** A whole sentence. */
  readonly sentence: string;
}

/** All equilibria found in a range. */
export interface Equilibria {
  readonly kind: "equilibria";
  readonly rule: Rule;
  readonly parameters: Readonly<Record<string, number>>;
  /** By state: the range searched. */
  readonly range: Readonly<Record<string, Interval>>;
  readonly points: readonly Equilibrium[];
  /**
   * `every` = one state: the range was covered and none can be missing; `all-values` = one state: whatever the
   * value, it stays, so none is listed; `many-starts` = a system: none may be
   * missing, but none is proven to be; `cut-short` = the search ran out of patience.
   */
  readonly search: "every" | "all-values" | "many-starts" | "cut-short";
  /** Starts used, for a system. */
  readonly searches: number;
}

export interface EquilibriaOptions extends HeldSetting {
  /**
   * Lowest and highest value to look at, for a system by state; default the rule's bounds, or as far as its
   * parameters and its turns from rising to falling suggest.
   */
  readonly range?: SearchRange;
  /** For systems: how many places the search starts from; default 400. */
  readonly searches?: number;
}

const shown = (value: number): string => String(Number(value.toPrecision(6)));

function described(held: HeldStep, present: ArrayLike<number>): Equilibrium {
  const { rule, width } = held;
  const state = settled(rule, present);
  const { next, matrix } = held.slopes(state);
  const multipliers = multipliersOf(matrix, width);
  const stability = stabilityOf(multipliers);
  const residual = state.reduce((most, value, i) => Math.max(most, Math.abs(next[i]! - value)), 0);
  const names = rule.states.map((name, i) => {
    const unit = rule.units[name] ?? "";
    return `${name} = ${shown(state[i]!)}${unit === "" ? "" : ` ${unit}`}`;
  });
  return {
    at: Object.fromEntries(rule.states.map((name, i) => [name, state[i]!])),
    residual,
    multipliers,
    ...stability,
    sentence: `The equilibrium ${names.join(", ")} ${stability.words}.`,
  };
}

type Found = { readonly points: readonly Float64Array[]; readonly search: Equilibria["search"] };

/** Whether every value stays as it is, judged at places spread over the range. */
function allStay(held: HeldStep, within: Interval): boolean {
  const next = new Float64Array(held.width);
  return spreadPoints([within], 50).every((place) => {
    held.step(settled(held.rule, place), next);
    return next[0] === place[0];
  });
}

function ofOneState(held: HeldStep, within: Interval): Found {
  if (allStay(held, within)) return { points: [], search: "all-values" };
  const enclosure = encloseStep(held.rule, held);
  const next = new Float64Array(held.width);
  const { roots, complete } = enclosedRoots({
    of: (x) => {
      held.step(settled(held.rule, [x]), next);
      return next[0]! - x;
    },
    enclose: (x) => {
      const { value, slope } = enclosure(x);
      return { value: [value[0] - x[1], value[1] - x[0]], slope: [slope[0] - 1, slope[1] - 1] };
    },
    within,
  });
  const points = roots.map((at) => Float64Array.of(at));
  return { points, search: complete ? "every" : "cut-short" };
}

const largest = (values: Float64Array): number =>
  values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);

function apart(a: Float64Array, b: Float64Array): boolean {
  const least = 1e-4 * Math.max(largest(a), largest(b));
  return a.some(
    (value, i) => Math.abs(value - b[i]!) > 1e-8 * Math.max(Math.abs(value), Math.abs(b[i]!), least),
  );
}

/** The point with 0 for values that differ from it by rounding only, where the rule leaves that as it is too. */
function withoutRounding(held: HeldStep, point: Float64Array): Float64Array {
  const size = largest(point);
  const rounded = point.map((value) => (Math.abs(value) < 1e-15 * size ? 0 : value));
  const next = new Float64Array(held.width);
  held.step(settled(held.rule, rounded), next);
  return rounded.every((value, i) => Math.abs(next[i]! - value) <= 1e-12 * size) ? rounded : point;
}

function ofSystem(held: HeldStep, within: readonly Interval[], starts: number): Found {
  const found: Float64Array[] = [];
  for (const start of spreadPoints(within, starts)) {
    const settledAt = settleByNewton(held, start);
    if (settledAt === undefined) continue;
    const point = withoutRounding(held, settledAt);
    const inside = point.every((value, i) => value >= within[i]![0] && value <= within[i]![1]);
    if (inside && found.every((other) => apart(point, other))) found.push(point);
  }
  return { points: found.sort((a, b) => a[0]! - b[0]! || a[1]! - b[1]!), search: "many-starts" };
}

/**
 * Finds the values that a rule leaves as they are, and says of each whether it is stable.
 *
 * One state: every equilibrium in the range, by a search over intervals that cannot lose a sign change; places
 * where the step only touches the line of no change are found to rounding. Systems: Newton's method from many
 * starts. A multiplier is a root of the linearised step; all of modulus below 1 means stable.
 *
 * @param options.inputs - by input, the value at which it is held.
 * @throws {ModelError} `missing-value` | `unknown-name` | `rule-changes-with-time` | `unreadable-option`.
 * @example equilibria(recurrence("ΔN = r*N*(1 - N/K)"), { parameters: { r: 0.5, K: 1000 } }).points[1].at.N; // 1000
 */
export function equilibria(rule: Rule, options: EquilibriaOptions = {}): Equilibria {
  const held = holdStep(rule, options, "equilibrium");
  const ranges = searchRanges(held, options.range);
  const single = rule.states.length === 1;
  const starts = single ? 0 : (options.searches ?? 400);
  const found = single ? ofOneState(held, ranges[0]!) : ofSystem(held, ranges, starts);
  return {
    kind: "equilibria",
    rule,
    parameters: Object.fromEntries(rule.parameters.map((name, i) => [name, held.parameters[i]!])),
    range: Object.fromEntries(rule.states.map((name, i) => [name, ranges[i]!])),
    points: found.points.map((point) => described(held, point)),
    search: found.search,
    searches: starts,
  };
}
