import type { Warning } from "../../numeric/index.js";
import type { ObservedGroup, ObservedState } from "../observations.js";
import type { PeriodAxis } from "../period/period-axis.js";
import { noLogarithm } from "./refusals.js";

/** The pairs of one state of one series. All arrays have one entry a pair, in order of the later row. */
export interface DifferenceSeries {
  readonly group: string;
  readonly state: string;
  /** The axis of the series: `labelAt(axis, index)` names the period of an earlier row. */
  readonly axis: PeriodAxis;
  /** Step index of the earlier row; the later one lies `steps` after it. */
  readonly index: Int32Array;
  readonly steps: Int32Array;
  /** 1-based record row of the later value. */
  readonly rows: Int32Array;
  readonly present: Float64Array;
  readonly next: Float64Array;
  /** next - present, over all `steps`: never spread over them. */
  readonly change: Float64Array;
  /** next / present; NaN where present is 0. */
  readonly ratio: Float64Array;
  /** change / present; NaN where present is 0. */
  readonly perHead: Float64Array;
  /** What was asked for by `order`, `per` and `seasonal`. */
  readonly difference: Float64Array;
}

/** What is asked for, with every default filled in. */
export interface DifferencePlan {
  readonly order: number;
  readonly lag: number;
  readonly per: "step" | "value" | "log";
  readonly seasonal: number | undefined;
}

/** Positions in a series: of the later and the earlier row of every pair. */
interface Pairs {
  readonly later: readonly number[];
  readonly earlier: readonly number[];
}

/** Every pair of one state of one series, and the difference asked for. */
export function differenceSeries(
  group: ObservedGroup,
  state: ObservedState,
  plan: DifferencePlan,
  warnings: Warning[],
): DifferenceSeries {
  const values = group.values[state.name]!;
  const scaled = plan.per === "log" ? logarithms(values, group, state) : values;
  const consecutive = plan.order === 1 && plan.lag === 1 && plan.seasonal === undefined;
  const combined = consecutive ? undefined : combinedDifference(group.index, scaled, plan);
  const pairs = consecutive ? neighbours(group.index) : exactPairs(group.index, combined!, plan);
  warnUnpaired(group, pairs, consecutive, warnings);
  const at = (column: Float64Array, places: readonly number[]) =>
    Float64Array.from(places, (i) => column[i]!);
  const present = at(values, pairs.earlier);
  const next = at(values, pairs.later);
  const change = next.map((value, i) => value - present[i]!);
  const perHead = change.map((value, i) => (present[i] === 0 ? Number.NaN : value / present[i]!));
  warnZero(group, state, pairs, present, warnings);
  return {
    group: group.name,
    state: state.name,
    axis: group.axis,
    index: Int32Array.from(pairs.earlier, (i) => group.index[i]!),
    steps: Int32Array.from(pairs.later, (i, n) => group.index[i]! - group.index[pairs.earlier[n]!]!),
    rows: Int32Array.from(pairs.later, (i) => group.rows[i]!),
    present,
    next,
    change,
    ratio: next.map((value, i) => (present[i] === 0 ? Number.NaN : value / present[i]!)),
    perHead,
    difference: asked(plan, pairs, scaled, combined, perHead),
  };
}

function asked(
  plan: DifferencePlan,
  pairs: Pairs,
  scaled: Float64Array,
  combined: Float64Array | undefined,
  perHead: Float64Array,
): Float64Array {
  if (plan.per === "value") return perHead.slice();
  if (combined !== undefined) return Float64Array.from(pairs.later, (i) => combined[i]!);
  return Float64Array.from(pairs.later, (i, n) => scaled[i]! - scaled[pairs.earlier[n]!]!);
}

function logarithms(values: Float64Array, group: ObservedGroup, state: ObservedState): Float64Array {
  const bad = values.findIndex((value) => !(value > 0));
  if (bad >= 0) throw noLogarithm(group.rows[bad]!, state.column, values[bad]!);
  return values.map(Math.log);
}

function neighbours(index: Int32Array): Pairs {
  const later = Array.from({ length: Math.max(0, index.length - 1) }, (_, i) => i + 1);
  return { later, earlier: later.map((i) => i - 1) };
}

/** Place of the row a number of steps before each row, or -1 where there is none. */
function placesBefore(index: Int32Array, steps: number): Int32Array {
  const places = new Int32Array(index.length).fill(-1);
  let before = 0;
  for (let i = 0; i < index.length; i++) {
    while (index[before]! < index[i]! - steps) before++;
    if (index[before]! === index[i]! - steps) places[i] = before;
  }
  return places;
}

/** The seasonal difference first, then `order` times the one of `lag`; NaN where a row it needs is missing. */
function combinedDifference(index: Int32Array, values: Float64Array, plan: DifferencePlan): Float64Array {
  const lags = new Array<number>(
    plan.seasonal !== undefined && plan.lag === 1 && plan.order === 1 ? 0 : plan.order,
  ).fill(plan.lag);
  return [...(plan.seasonal === undefined ? [] : [plan.seasonal]), ...lags].reduce((column, steps) => {
    const places = placesBefore(index, steps);
    return column.map((value, i) => (places[i]! < 0 ? Number.NaN : value - column[places[i]!]!));
  }, values);
}

function exactPairs(index: Int32Array, combined: Float64Array, plan: DifferencePlan): Pairs {
  const places = placesBefore(index, plan.seasonal ?? plan.lag);
  const later = Array.from(combined.keys()).filter((i) => !Number.isNaN(combined[i]!));
  return { later, earlier: later.map((i) => places[i]!) };
}

function warnUnpaired(group: ObservedGroup, pairs: Pairs, consecutive: boolean, warnings: Warning[]): void {
  const unpaired = group.index.length - pairs.later.length;
  if (consecutive || unpaired === 0) return;
  const where = group.name === "" ? "" : ` of "${group.name}"`;
  warnings.push({
    code: "unpaired-rows",
    message: `${unpaired} of ${group.index.length} rows${where} have no difference, because a row that it needs lies before the record or in a gap.`,
  });
}

function warnZero(
  group: ObservedGroup,
  state: ObservedState,
  pairs: Pairs,
  present: Float64Array,
  warnings: Warning[],
): void {
  const zero = present.indexOf(0);
  if (zero < 0) return;
  const row = group.rows[pairs.earlier[zero]!];
  warnings.push({
    code: "no-ratio",
    message: `Row ${row}, ${state.column}: from a value of 0 there is no ratio and no change per value; they are left empty.`,
  });
}
