import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import { longestLag, slotsOf } from "../unknowns/slots.js";
import { rootWeight, valueTable } from "./value-table.js";

/** The readings of a group in the order in which a filter takes them in. All arrays have one entry a reading. */
export interface Readings {
  readonly count: number;
  readonly periods: Int32Array;
  readonly entries: Int32Array;
  readonly states: Int32Array;
  /** On the fitting scale, and in the record's own unit. */
  readonly values: Float64Array;
  readonly observed: Float64Array;
  readonly roots: Float64Array;
  /** Period at which the filter begins, and how many readings lie there. */
  readonly first: number;
  readonly skipped: number;
  /** [slots]: the state vector as read (or known) where the filter begins, on the fitting scale, and roots of its weights. */
  readonly beginning: Float64Array;
  readonly beginningRoots: Float64Array;
  /** [slots]: the number of the state that a slot holds, now or from the past. */
  readonly slotStates: Int32Array;
  /** Puts other values [rows of the group, states] in the record's place. */
  take(values: Float64Array): void;
}

/**
 * Orders the readings of a group for a filter.
 *
 * @param known - [slots], own unit: a state vector without error to begin from, instead of the first readings.
 */
export function readingsOf(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  known?: Float64Array,
): Readings {
  const states = rule.states.length;
  const log = onLogScale(options);
  const first = longestLag(rule);
  const recorded = valueTable(rule, group);
  const cells = Array.from(recorded, (value, k) => ({
    value,
    entry: Math.floor(k / states),
    state: k % states,
  }))
    .filter(({ value }) => !Number.isNaN(value))
    .filter(({ entry }) => group.index[entry]! >= first);
  const slots = slotsOf(rule).map(({ state, lag }) => ({
    state: rule.states.indexOf(state),
    entry: Math.max(
      0,
      group.index.findIndex((index) => index >= first - lag),
    ),
  }));
  const values = new Float64Array(cells.length);
  const observed = new Float64Array(cells.length);
  const beginning = new Float64Array(slots.length);
  const scaled = (value: number): number => (log ? Math.log(value) : value);
  const take = (given: Float64Array): void => {
    cells.forEach(({ entry, state }, i) => {
      observed[i] = given[entry * states + state]!;
      values[i] = scaled(observed[i]!);
    });
    slots.forEach(({ entry, state }, s) => {
      beginning[s] = scaled(known?.[s] ?? given[entry * states + state]!);
    });
  };
  take(recorded);
  // One known standard deviation for all readings is a variance of the filter, which may be 0; a column of them weighs.
  const column = typeof options.sd === "string" ? options.sd : undefined;
  const readingRoot = (state: string, entry: number): number => rootWeight(group, state, entry, column);
  return {
    count: cells.length,
    periods: Int32Array.from(cells, ({ entry }) => group.index[entry]!),
    entries: Int32Array.from(cells, ({ entry }) => entry),
    states: Int32Array.from(cells, ({ state }) => state),
    values,
    observed,
    roots: Float64Array.from(cells, ({ entry, state }) => readingRoot(rule.states[state]!, entry)),
    first,
    skipped: cells.filter(({ entry }) => group.index[entry] === first).length,
    beginning,
    beginningRoots: Float64Array.from(slots, ({ entry, state }) =>
      known ? Number.POSITIVE_INFINITY : readingRoot(rule.states[state]!, entry),
    ),
    slotStates: Int32Array.from(slots, ({ state }) => state),
    take,
  };
}
