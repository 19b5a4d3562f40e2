import { normalCdf, type RunHooks, ticker } from "../../numeric/index.js";
import type { Interval, Rule } from "../../rule/index.js";
import { orbit } from "../cycle/cycle-points.js";
import { oneStateOnly, unreadableOption } from "../refusals.js";
import { type HeldSetting, type HeldStep, holdStep } from "../setting/held-step.js";

export interface BasinsOptions extends HeldSetting, RunHooks {
  /** Lowest and highest first value to look at. */
  readonly range: Interval;
  /** First values tried before borders are narrowed down; default 400. */
  readonly count?: number;
  /** Periods until a path is taken to have arrived; default 3,000. */
  readonly periods?: number;
  /** What is known of the first value: normal with this mean and standard deviation. */
  readonly known?: {
    /** Mean of the first value. */
    readonly mean: number;
    /** Standard deviation of the first value. */
    readonly sd: number;
  };
}

/** Where starts end up. */
export interface Basin {
  /** Values visited in the long run, lowest first, at most 16; empty where paths leave the finite range. */
  readonly attractor: readonly number[];
  /** Stretches of first values that lead there. */
  readonly from: readonly Interval[];
  /** Probability of starting in them, where `known` was given. */
  readonly probability: number | undefined;
}

export interface Basins {
  readonly kind: "basins";
  readonly rule: Rule;
  readonly range: Interval;
  readonly basins: readonly Basin[];
  /** First values at which the basin changes. */
  readonly borders: readonly number[];
}

/** Long-run values of a start, rounded for comparison: chaotic ones are told by their range alone. */
function destination(held: HeldStep, start: number, periods: number): readonly number[] {
  const state = Float64Array.of(start);
  for (let k = 0; k < periods; k++) held.step(state, state);
  if (!Number.isFinite(state[0]!)) return [];
  const visited = [...orbit(held, state[0]!, 64)].sort((a, b) => a - b);
  if (!visited.every(Number.isFinite)) return [];
  const scale = Math.max(Math.abs(visited[0]!), Math.abs(visited.at(-1)!), 1e-9);
  const distinct = visited.filter((x, i) => i === 0 || x - visited[i - 1]! > 1e-5 * scale);
  return distinct.length <= 16 ? distinct : [distinct[0]!, distinct.at(-1)!];
}

/** Whether two destinations are one; ranges of chaotic ones are compared loosely. */
function same(a: readonly number[], b: readonly number[], scale: number): boolean {
  if (a.length !== b.length) return a.length === 2 && b.length === 2;
  return a.every((x, i) => Math.abs(x - b[i]!) <= 1e-3 * scale);
}

/** Halves a stretch until its ends touch; the ends lead to different places. */
function borderBetween(leadsToFirst: (x: number) => boolean, low: number, high: number): number {
  let [a, b] = [low, high];
  for (let k = 0; k < 60 && b - a > 1e-13 * Math.max(Math.abs(a), Math.abs(b)); k++) {
    const middle = (a + b) / 2;
    if (leadsToFirst(middle)) a = middle;
    else b = middle;
  }
  return (a + b) / 2;
}

function probabilityOf(
  stretches: readonly Interval[],
  within: Interval,
  { known }: BasinsOptions,
): number | undefined {
  if (known === undefined) return undefined;
  const upTo = (x: number): number => normalCdf((x - known.mean) / known.sd);
  return stretches.reduce((sum, [low, high]) => {
    const from = low === within[0] ? Number.NEGATIVE_INFINITY : low;
    const to = high === within[1] ? Number.POSITIVE_INFINITY : high;
    return sum + upTo(to) - upTo(from);
  }, 0);
}

/**
 * Sorts first values of a rule of one state by where they end up, finds the borders between them, and, where the
 * first value is known with a standard deviation, the probability of each; values beyond the range count with its
 * ends.
 *
 * @throws {ModelError} `one-state-only` | `unreadable-option` | `missing-value` | `rule-changes-with-time`.
 * @example basins(rules.allee(), { parameters: { r: 0.2, K: 100, A: 20 }, range: [0, 110] }).borders[0].toFixed(6); // "20.000000"
 */
export function basins(rule: Rule, options: BasinsOptions): Basins {
  const { range: within, count: starts = 400, periods = 3_000 } = options;
  if (rule.states.length !== 1 || rule.lags.length > 0) throw oneStateOnly("A basin", rule.states);
  if (!(within[0] < within[1]))
    throw unreadableOption("within", "two numbers, lowest first", JSON.stringify(within));
  const held = holdStep(rule, options, "basin");
  const scale = Math.max(Math.abs(within[0]), Math.abs(within[1]));
  const found: { readonly attractor: readonly number[]; readonly from: Interval[] }[] = [];
  const tick = ticker(options, starts);
  const kindOf = (x: number): number => {
    tick();
    const attractor = destination(held, x, periods);
    const known = found.findIndex((basin) => same(basin.attractor, attractor, scale));
    return known >= 0 ? known : found.push({ attractor, from: [] }) - 1;
  };
  // The ends themselves are often rest levels, so places just inside are tried.
  const places = Array.from(
    { length: starts },
    (_, i) => within[0] + ((within[1] - within[0]) * (i + 0.5)) / starts,
  );
  const kinds = places.map(kindOf);
  const borders: number[] = [];
  let begun = within[0];
  kinds.forEach((kind, i) => {
    const next = kinds[i + 1];
    if (next === kind) return;
    const end =
      next === undefined ? within[1] : borderBetween((x) => kindOf(x) === kind, places[i]!, places[i + 1]!);
    found[kind]!.from.push([begun, end]);
    if (next !== undefined) borders.push(end);
    begun = end;
  });
  const list = found
    .filter(({ from }) => from.length > 0)
    .map((basin) => ({ ...basin, probability: probabilityOf(basin.from, within, options) }));
  return {
    kind: "basins",
    rule,
    range: within,
    basins: list,
    borders,
  };
}
