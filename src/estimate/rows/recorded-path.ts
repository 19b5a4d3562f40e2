import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import { longestLag, slotsOf } from "../unknowns/slots.js";
import { inputsByPeriod } from "./inputs-by-period.js";
import { rootWeight, valueTable } from "./value-table.js";

/** A group laid along the path of a rule. */
export interface RecordedPath {
  /** Period of the path's first row: the longest lag, whose earlier periods are its past values. */
  readonly first: number;
  /** Steps of the path. */
  readonly periods: number;
  readonly inputs: readonly Float64Array[];
  /** [count]: cell of the path [periods + 1, slots] at which each recorded value stands. */
  readonly places: Int32Array;
  readonly entries: Int32Array;
  readonly states: Int32Array;
  /** [count], own unit. */
  readonly observed: Float64Array;
  readonly roots: Float64Array;
  readonly log: boolean;
  /** [periods + 1, slots]: observed on the fitting scale, and roots of weights, 0 where nothing is recorded. */
  readonly table: Float64Array;
  readonly weights: Float64Array;
  take(values: Float64Array): void;
}

/** Lays a group's values along the path of a rule. */
export function recordedPath(rule: Rule, group: ObservedGroup, options: FitOptions): RecordedPath {
  const first = longestLag(rule);
  const slots = slotsOf(rule);
  const states = rule.states.length;
  const periods = group.index[group.index.length - 1]! - first;
  const log = onLogScale(options);
  const cells: { place: number; entry: number; state: number }[] = [];
  const values = valueTable(rule, group);
  group.index.forEach((period, entry) => {
    for (let state = 0; state < states; state++) {
      const lag = Math.max(0, first - period);
      const slot = slots.findIndex((each) => each.state === rule.states[state] && each.lag === lag);
      if (slot < 0 || Number.isNaN(values[entry * states + state]!)) continue;
      cells.push({ place: Math.max(0, period - first) * slots.length + slot, entry, state });
    }
  });
  const observed = new Float64Array(cells.length);
  const roots = Float64Array.from(cells, ({ entry, state }) =>
    rootWeight(group, rule.states[state]!, entry, options.sd),
  );
  const table = new Float64Array((periods + 1) * slots.length);
  const weights = new Float64Array(table.length);
  cells.forEach(({ place }, i) => {
    weights[place] = roots[i]!;
  });
  const take = (given: Float64Array): void => {
    for (let i = 0; i < cells.length; i++) {
      const { place, entry, state } = cells[i]!;
      const value = given[entry * states + state]!;
      observed[i] = value;
      table[place] = log ? Math.log(value) : value;
    }
  };
  take(values);
  return {
    first,
    periods,
    inputs: inputsByPeriod(rule, group),
    places: Int32Array.from(cells, ({ place }) => place),
    entries: Int32Array.from(cells, ({ entry }) => entry),
    states: Int32Array.from(cells, ({ state }) => state),
    observed,
    roots,
    log,
    table,
    weights,
    take,
  };
}
