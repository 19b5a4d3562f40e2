import type { RandomStream } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { compileRule, dependsOnPeriod, type Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import { scaleOf } from "../problem/scale.js";
import type { FitRows } from "../rows/fit-rows.js";
import { inputsByPeriod } from "../rows/inputs-by-period.js";
import { type Predictions, predictionRows } from "../rows/prediction-rows.js";
import { type Readings, readingsOf } from "../rows/readings.js";
import { slotsOf } from "../unknowns/slots.js";
import { place, type Unknowns } from "../unknowns/unknowns.js";
import { drawStateSpace } from "./draw-state-space.js";
import { type Belief, type Dynamics, predict, scratch, takeIn } from "./kalman-step.js";
import { type LinearRule, linearFilter, longRun } from "./linear-filter.js";
import type { ParticleModel } from "./particle-filter.js";

/** A group seen through a rule with errors in its steps and in its readings. */
export interface StateSpace {
  /** Twice the negative log-likelihood; infinite where it does not exist. */
  readonly minusTwice: (at: Float64Array) => number;
  /** One-step predictions, as the values that the fit compares. */
  readonly rows: FitRows;
  /** The belief after the last reading of the last evaluation. */
  readonly belief: Belief;
  /** What particles need at the unknowns given. */
  readonly particleModel: (at: Float64Array) => ParticleModel;
  /** The first reading less the mean of readings in the long run, over their standard deviation; NaN without a long run. */
  readonly firstInLongRun: (at: Float64Array) => number;
  /** One-step prediction errors over their standard deviations, [values compared]. */
  readonly standardised: (at: Float64Array) => Float64Array;
  /** A record drawn at the unknowns given: values [rows of the group, states], own unit. */
  readonly draw: (at: Float64Array, stream: RandomStream) => Float64Array;
}

/** How the first reading is taken, and whether the rule is linear, so that the filter is exact. */
export interface Filtering {
  readonly start: "stationary" | "diffuse" | "known";
  readonly method: "exact" | "extended";
}

/**
 * The likelihood of a group by the Kalman filter, on the scale of the spread: state moved by the rule with process
 * errors, readings with observation errors. Spreads of the unknowns are the process sd, then the observation sd of
 * every state, the latter only where it is not given.
 *
 * A diffuse beginning takes the first reading as the state, with the reading's own error, and leaves it out of
 * the likelihood; a stationary one, for a single state with a stable linear rule, takes it from the long run. A known
 * beginning has no error, and leaves the first reading out too: where the given value is that reading, the reading would
 * pass for one without error.
 *
 * @see Harvey (1989), Forecasting, Structural Time Series Models and the Kalman Filter, sections 3.2 and 3.3.
 * @see Dennis, Ponciano, Lele, Taper and Staples (2006), Ecological Monographs 76:323, for the Gompertz rule.
 */
export function stateSpace(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
  { start, method }: Filtering,
): StateSpace {
  const dynamics = dynamicsOf(rule, group, options);
  const slots = slotsOf(rule).length;
  const belief: Belief = { mean: new Float64Array(slots), covariance: new Float64Array(slots * slots) };
  const readings = readingsOf(rule, group, options, start === "known" ? unknowns.initial : undefined);
  const { parameters, spreads } = unknowns;
  const variance = new Float64Array(rule.states.length);
  // Known standard deviations of single readings are part of their weights.
  const known = typeof options.sd === "string" ? 1 : options.sd;
  const readingVariance = (s: number): number =>
    known === undefined ? spreads[rule.states.length + s]! : known * known;
  const from = start === "stationary" ? 0 : readings.skipped;

  const setDown = (at: Float64Array): void => {
    place(unknowns, at);
    for (let s = 0; s < variance.length; s++) variance[s] = spreads[s]!;
  };
  const exact = (told?: Predictions): number => {
    const linear = linearAt(dynamics, parameters, readings, variance[0]!, readingVariance(0));
    const first =
      start === "stationary"
        ? longRun(linear)
        : {
            mean: readings.beginning[0]!,
            variance: linear.readingVariance / readings.beginningRoots[0]! ** 2,
          };
    if (first === undefined) return Number.NaN;
    const sum = linearFilter(linear, readings, from, first, told);
    belief.mean[0] = first.mean;
    belief.covariance[0] = first.variance;
    return sum;
  };
  const extended = (told?: Predictions): number => {
    beginAsRead(belief, readings, readingVariance);
    return extendedFilter(belief, dynamics, parameters, readings, from, variance, readingVariance, told);
  };
  const run = (at: Float64Array, told?: Predictions): number => {
    setDown(at);
    return method === "exact" ? exact(told) : extended(told);
  };
  const predicted: Predictions = {
    mean: new Float64Array(readings.count),
    deviation: new Float64Array(readings.count),
  };
  return {
    belief,
    minusTwice(at) {
      const sum = run(at);
      return Number.isFinite(sum) ? -2 * sum : Number.POSITIVE_INFINITY;
    },
    particleModel(at) {
      setDown(at);
      const sds = rule.states.map((_, s) => Math.sqrt(readingVariance(s)));
      return {
        dynamics,
        parameters,
        readings,
        processSd: variance.map(Math.sqrt),
        readingSd: sds,
      };
    },
    firstInLongRun(at) {
      setDown(at);
      const own = readingVariance(0) / readings.beginningRoots[0]! ** 2;
      const run = longRun(linearAt(dynamics, parameters, readings, variance[0]!, own));
      return run === undefined
        ? Number.NaN
        : (readings.beginning[0]! - run.mean) / Math.sqrt(run.variance + own);
    },
    draw: drawStateSpace(rule, group, options, unknowns, readings, start, readingVariance),
    standardised(at) {
      run(at, predicted);
      const all = readings.values.map((value, i) => (value - predicted.mean[i]!) / predicted.deviation[i]!);
      return all.subarray(from);
    },
    rows: predictionRows(readings, unknowns.names.length, from, predicted, scaleOf(options).from, (at) => {
      run(at, predicted);
    }),
  };
}

/** Whether a rule of one state, the same in every period, is linear on the fitting scale at parameters set down. */
export function isLinearOnScale(
  rule: Rule,
  group: ObservedGroup,
  unknowns: Unknowns,
  options: FitOptions,
  at: Float64Array,
): boolean {
  if (slotsOf(rule).length !== 1 || rule.inputs.length > 0 || dependsOnPeriod(rule)) return false;
  place(unknowns, at);
  const dynamics = dynamicsOf(rule, group, options);
  const { values } = readingsOf(rule, group, options);
  const low = Math.min(...values);
  const high = Math.max(...values);
  const slopes = [low, (low + high) / 2, high].map((mean) => {
    predict(
      { mean: Float64Array.of(mean), covariance: new Float64Array(1) },
      dynamics,
      unknowns.parameters,
      0,
      new Float64Array(1),
    );
    return dynamics.slopes[0]!;
  });
  return slopes.every((slope) => Math.abs(slope - slopes[0]!) <= 1e-9 * Math.max(1, Math.abs(slopes[0]!)));
}

function dynamicsOf(rule: Rule, group: ObservedGroup, options: FitOptions): Dynamics {
  return {
    compiled: compileRule(rule),
    inputs: inputsByPeriod(rule, group),
    log: onLogScale(options),
    states: rule.states.length,
    ...scratch(slotsOf(rule).length, rule.parameters.length),
  };
}

/** A linear rule read off from one step. */
function linearAt(
  dynamics: Dynamics,
  parameters: Float64Array,
  { beginning }: Readings,
  processVariance: number,
  readingVariance: number,
): LinearRule {
  const belief = { mean: Float64Array.of(beginning[0]!), covariance: new Float64Array(1) };
  predict(belief, dynamics, parameters, 0, new Float64Array(1));
  const slope = dynamics.slopes[0]!;
  return { slope, intercept: belief.mean[0]! - slope * beginning[0]!, processVariance, readingVariance };
}

function beginAsRead(
  belief: Belief,
  { beginning, beginningRoots, slotStates }: Readings,
  readingVariance: (state: number) => number,
): void {
  const slots = beginning.length;
  belief.mean.set(beginning);
  belief.covariance.fill(0);
  for (let i = 0; i < slots; i++)
    belief.covariance[i * slots + i] = readingVariance(slotStates[i]!) / beginningRoots[i]! ** 2;
}

function extendedFilter(
  belief: Belief,
  dynamics: Dynamics,
  parameters: Float64Array,
  readings: Readings,
  from: number,
  variance: Float64Array,
  readingVariance: (state: number) => number,
  told: Predictions | undefined,
): number {
  let period = readings.first;
  let sum = 0;
  for (let i = from; i < readings.count; i++) {
    for (; period < readings.periods[i]!; period++) predict(belief, dynamics, parameters, period, variance);
    const s = readings.states[i]!;
    const own = readingVariance(s) / readings.roots[i]! ** 2;
    if (told !== undefined) {
      told.mean[i] = belief.mean[s]!;
      told.deviation[i] = Math.sqrt(belief.covariance[s * (belief.mean.length + 1)]! + own);
    }
    sum += takeIn(belief, dynamics, s, readings.values[i]!, own);
  }
  return sum;
}
