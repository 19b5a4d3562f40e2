import type { ObservedGroup } from "../record/index.js";
import { compileRule, type Rule, readsPeriod } from "../rule/index.js";
import { type FitOptions, onLogScale } from "./fit-options.js";
import type { FitRows } from "./fit-rows.js";
import { inputsByPeriod } from "./inputs-by-period.js";
import { type Belief, type Dynamics, predict, scratch, takeIn } from "./kalman-step.js";
import { longestLag, slotsOf } from "./slots.js";
import { place, type Unknowns } from "./unknowns.js";
import { rootWeight, valueTable } from "./value-table.js";

/** A group seen through a rule with errors in its steps and in its readings. */
export interface StateSpace {
  /** Twice the negative log-likelihood; infinite where it does not exist. */
  readonly minusTwice: (at: Float64Array) => number;
  /** One-step predictions, as the values that the fit compares. */
  readonly rows: FitRows;
  /** The belief after the last reading of the last evaluation. */
  readonly belief: Belief;
  /** Whether one step is linear in the state on the fitting scale, at the unknowns placed last. */
  readonly isLinear: (at: Float64Array) => boolean;
  /** Standard deviation of a reading in the long run of a stable linear rule with one state. */
  readonly longRunSd: (at: Float64Array) => number;
}

/** How the first reading is taken. */
export type Beginning = "stationary" | "diffuse";

/**
 * The likelihood of a group by the Kalman filter, on the scale of the spread: state moved by the rule with process
 * errors, readings with observation errors. Spreads of the unknowns are the process sd, then the observation sd of
 * every state, the latter only where it is not given.
 *
 * A diffuse beginning takes the first reading as the state, with the reading's own error, and leaves it out of
 * the likelihood; a stationary one, for a single state with a stable linear rule, takes it from the long run.
 *
 * @see Harvey (1989), Forecasting, Structural Time Series Models and the Kalman Filter, sections 3.2 and 3.3.
 * @see Dennis, Ponciano, Lele, Taper and Staples (2006), Ecological Monographs 76:323, for the Gompertz rule.
 */
export function stateSpace(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
  beginning: Beginning,
): StateSpace {
  const slots = slotsOf(rule).length;
  const states = rule.states.length;
  const log = onLogScale(options);
  const dynamics: Dynamics = {
    compiled: compileRule(rule),
    inputs: inputsByPeriod(rule, group),
    log,
    states,
    ...scratch(slots, rule.constants.length),
  };
  const belief: Belief = { mean: new Float64Array(slots), covariance: new Float64Array(slots * slots) };
  const { constants, spreads } = unknowns;
  const known = typeof options.spread === "object" ? options.spread.sd : undefined;
  const processVariance = new Float64Array(states);
  const readingSd = (s: number): number => known ?? spreads[states + s]!;
  const readings = readingsOf(rule, group, options);
  const begin = beginning === "stationary" ? beginStationary : beginDiffuse;
  const run = (at: Float64Array, predicted?: Float64Array): number => {
    place(unknowns, at);
    for (let s = 0; s < states; s++) processVariance[s] = spreads[s]! ** 2;
    let period = readings.first;
    if (!begin(belief, dynamics, constants, processVariance, readings, readingSd)) return Number.NaN;
    let sum = 0;
    for (let i = beginning === "diffuse" ? readings.skipped : 0; i < readings.count; i++) {
      for (; period < readings.periods[i]!; period++)
        predict(belief, dynamics, constants, period, processVariance);
      const s = readings.states[i]!;
      if (predicted) predicted[i] = belief.mean[s]!;
      sum += takeIn(belief, dynamics, s, readings.values[i]!, (readingSd(s) / readings.roots[i]!) ** 2);
    }
    return sum;
  };
  return {
    belief,
    minusTwice(at) {
      const sum = run(at);
      return Number.isFinite(sum) ? -2 * sum : Number.POSITIVE_INFINITY;
    },
    isLinear(at) {
      place(unknowns, at);
      return !readsPeriod(rule) && slots === 1 && isLinear(dynamics, constants, readings);
    },
    longRunSd(at) {
      place(unknowns, at);
      processVariance[0] = spreads[0]! ** 2;
      const stable = beginStationary(belief, dynamics, constants, processVariance, readings, readingSd);
      return stable ? Math.sqrt(belief.covariance[0]! + readingSd(0) ** 2) : Number.NaN;
    },
    rows: predictionRows(
      readings,
      states,
      unknowns.names.length,
      beginning === "diffuse" ? readings.skipped : 0,
      log,
      run,
    ),
  };
}

interface Readings {
  readonly count: number;
  readonly periods: Int32Array;
  readonly entries: Int32Array;
  readonly states: Int32Array;
  /** On the fitting scale. */
  readonly values: Float64Array;
  readonly observed: Float64Array;
  readonly roots: Float64Array;
  /** Period at which the filter begins, and how many readings lie there. */
  readonly first: number;
  readonly skipped: number;
  /** [slots], on the fitting scale: the state vector as read where the filter begins. */
  readonly beginning: Float64Array;
}

function readingsOf(rule: Rule, group: ObservedGroup, options: FitOptions): Readings {
  const states = rule.states.length;
  const log = onLogScale(options);
  const table = valueTable(rule, group).map((value) => (log ? Math.log(value) : value));
  const first = longestLag(rule);
  const cells: { entry: number; state: number; value: number }[] = [];
  for (let k = 0; k < table.length; k++) {
    const entry = Math.floor(k / states);
    if (!Number.isNaN(table[k]!) && group.index[entry]! >= first)
      cells.push({ entry, state: k % states, value: table[k]! });
  }
  const nearest = (state: string, period: number): number => {
    const entry = Math.max(
      0,
      group.index.findIndex((index) => index >= period),
    );
    const value = group.values[state]![entry]!;
    return log ? Math.log(value) : value;
  };
  return {
    count: cells.length,
    periods: Int32Array.from(cells, ({ entry }) => group.index[entry]!),
    entries: Int32Array.from(cells, ({ entry }) => entry),
    states: Int32Array.from(cells, ({ state }) => state),
    values: Float64Array.from(cells, ({ value }) => value),
    observed: Float64Array.from(cells, ({ value }) => (log ? Math.exp(value) : value)),
    roots: Float64Array.from(cells, ({ entry, state }) =>
      rootWeight(group, rule.states[state]!, entry, undefined),
    ),
    first,
    skipped: cells.filter(({ entry }) => group.index[entry] === first).length,
    beginning: Float64Array.from(slotsOf(rule), ({ state, lag }) => nearest(state, first - lag)),
  };
}

type Begin = (
  belief: Belief,
  dynamics: Dynamics,
  constants: Float64Array,
  processVariance: Float64Array,
  readings: Readings,
  readingSd: (state: number) => number,
) => boolean;

const beginDiffuse: Begin = (belief, dynamics, _constants, _variance, { beginning }, readingSd) => {
  const slots = beginning.length;
  belief.mean.set(beginning);
  belief.covariance.fill(0);
  for (let i = 0; i < slots; i++) belief.covariance[i * slots + i] = readingSd(i % dynamics.states) ** 2;
  return true;
};

/** Mean a / (1 - b) and variance q / (1 - b^2) of u' = a + b u + e; false where |b| is not below 1. */
const beginStationary: Begin = (belief, dynamics, constants, processVariance, { beginning }) => {
  belief.mean.set(beginning);
  belief.covariance.fill(0);
  belief.covariance[0] = 1;
  predict(belief, dynamics, constants, 0, new Float64Array(1));
  const slope = dynamics.slopes[0]!;
  if (!(Math.abs(slope) < 1)) return false;
  belief.mean[0] = (belief.mean[0]! - slope * beginning[0]!) / (1 - slope);
  belief.covariance[0] = processVariance[0]! / (1 - slope * slope);
  return Number.isFinite(belief.mean[0]!);
};

function isLinear(dynamics: Dynamics, constants: Float64Array, { values }: Readings): boolean {
  const low = Math.min(...values);
  const high = Math.max(...values);
  const slopes = [low, (low + high) / 2, high].map((at) => {
    const belief = { mean: Float64Array.of(at), covariance: Float64Array.of(0) };
    predict(belief, dynamics, constants, 0, new Float64Array(1));
    return dynamics.slopes[0]!;
  });
  return slopes.every((slope) => Math.abs(slope - slopes[0]!) <= 1e-9 * Math.max(1, Math.abs(slopes[0]!)));
}

function predictionRows(
  readings: Readings,
  states: number,
  size: number,
  skipped: number,
  log: boolean,
  run: (at: Float64Array, predicted: Float64Array) => number,
): FitRows {
  const predicted = new Float64Array(readings.count);
  let fitted = 0;
  return {
    size,
    count: readings.count - skipped,
    row: new Float64Array(size).fill(Number.NaN),
    entries: readings.entries.subarray(skipped),
    states: readings.states.subarray(skipped),
    observed: readings.observed.subarray(skipped),
    roots: readings.roots.subarray(skipped),
    prepare(at) {
      run(at, predicted);
    },
    residualAt(i) {
      const mean = predicted[i + skipped]!;
      fitted = log ? Math.exp(mean) : mean;
      return readings.roots[i + skipped]! * (readings.values[i + skipped]! - mean);
    },
    fitted: () => fitted,
    take(values) {
      for (let i = 0; i < readings.count; i++) {
        const value = values[readings.entries[i]! * states + readings.states[i]!]!;
        readings.observed[i] = value;
        readings.values[i] = log ? Math.log(value) : value;
      }
    },
  };
}
