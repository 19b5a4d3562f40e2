import type { Fit, GroupFit } from "../estimate/index.js";
import { type RandomStream, randomStream, type Warning } from "../numeric/index.js";
import { compileRule } from "../rule/index.js";
import { type Band, bandsOf } from "./band.js";
import { constantsDraw } from "./draw-constants.js";
import { drawPaths, type PathDraws } from "./draw-paths.js";
import { refuseFutureInput, refuseNoPath, refusePeriods, refuseUndetermined } from "./refusals.js";

/** Options of `forecast`. */
export interface ForecastOptions {
  /** Whole periods beyond the last recorded one. */
  readonly periods: number;
  /** Levels of the bands; default 0.5, 0.8, 0.95. */
  readonly levels?: readonly number[];
  /** Drawn paths; default 4000. */
  readonly paths?: number;
  /** Seed of the draws; default 1. */
  readonly seed?: number;
}

/** A forecast of one group. All series run over `index`. */
export interface GroupForecast {
  readonly group: string;
  /** Step indexes: from period 0 for a trajectory fit, from the last recorded one for a one-step fit. */
  readonly index: readonly number[];
  /** The period column's values there. */
  readonly time: readonly number[];
  /** Step index of the last recorded value. */
  readonly recordEnd: number;
  readonly states: readonly {
    readonly state: string;
    readonly unit: string;
    /** The path at the estimates. */
    readonly central: readonly number[];
    readonly bands: readonly Band[];
  }[];
  readonly draws: PathDraws;
  readonly warnings: readonly Warning[];
}

/** A fit carried forward, with its uncertainties kept apart. */
export interface Forecast {
  readonly kind: "forecast";
  readonly fit: Fit;
  readonly options: Required<ForecastOptions>;
  readonly groups: readonly GroupForecast[];
}

/**
 * Carries a fit forward: the path at the estimates, and bands from drawn constants without (`mean path`) and with
 * (`future observation`) the errors of single values.
 *
 * Constants are drawn from a multivariate t around the estimates. With errors in the observation the rule runs from its
 * initial state and the reading's error is added on top; with errors in the process it runs from the last
 * recorded value and every step has its own error.
 *
 * @returns per group central path, bands [index] in the state's unit, and the draws themselves.
 * @throws {ModelError} `periods-not-whole` | `future-input-missing` | `constants-not-separated` | `no-finite-path`.
 * @example forecast(fitted, { periods: 12 }).groups[0].states[0].central.length; // recorded periods + 12
 */
export function forecast(fit: Fit, options: ForecastOptions): Forecast {
  const { periods, levels = [0.5, 0.8, 0.95], paths = 4000, seed = 1 } = options;
  if (!Number.isInteger(periods) || periods < 1) throw refusePeriods(periods);
  if (fit.rule.inputs.length > 0) throw refuseFutureInput(fit.rule.inputs, periods);
  const settings = { periods, levels, paths, seed };
  let stream = randomStream(seed);
  const groups = fit.groups.map((group) => {
    const own = stream;
    stream = stream.jump();
    return groupForecast(fit, group, settings, own);
  });
  return Object.freeze({
    kind: "forecast",
    fit,
    options: Object.freeze(settings),
    groups: Object.freeze(groups),
  });
}

function groupForecast(
  fit: Fit,
  group: GroupFit,
  options: Required<ForecastOptions>,
  stream: RandomStream,
): GroupForecast {
  const { rule, observations } = fit;
  const recorded = observations.groups.find((each) => each.name === group.group)!;
  const recordEnd = recorded.index[recorded.index.length - 1]!;
  const process = fit.options.errors === "process";
  const from = process ? recordEnd : 0;
  const periods = recordEnd + options.periods - from;
  const start = process ? lastRecorded(group, recorded.values, rule.states) : group;
  const compiled = compileRule(rule);
  const constants = Float64Array.from(rule.constants, (name) => group.constants[name]!);
  const initial = Float64Array.from(rule.states, (state) => start.initial[state]!);
  const path = new Float64Array((periods + 1) * rule.states.length);
  compiled.path(initial, constants, [], from, periods, path);
  if (!path.every(Number.isFinite)) throw refuseNoPath(group.group, rule.text);
  const estimates = Float64Array.from(group.estimates, (estimate) => estimate.value);
  const draw = constantsDraw(estimates, Float64Array.from(group.covariance), group.degreesOfFreedom);
  if (draw === undefined) throw refuseUndetermined(group.group);
  const draws = drawPaths({ fit, group: start, compiled, draw, from, periods, paths: options.paths }, stream);
  const index = Array.from({ length: periods + 1 }, (_, t) => from + t);
  const step = observations.period.step.every;
  return {
    group: group.group,
    index,
    time: index.map((t) => recorded.time[0]! + t * step),
    recordEnd,
    states: rule.states.map((state, s) => ({
      state,
      unit: observations.states.find((each) => each.name === state)!.unit,
      central: index.map((_, t) => path[t * rule.states.length + s]!),
      bands: [
        ...bandsOf("mean path", draws.mean[s]!, periods + 1, options.levels),
        ...bandsOf("future observation", draws.future[s]!, periods + 1, options.levels),
      ],
    })),
    draws,
    warnings: warningsOf(group, draws, options.periods, recordEnd),
  };
}

/** The fit with the last recorded values as its initial states, where a one-step fit's future begins. */
function lastRecorded(
  group: GroupFit,
  values: Readonly<Record<string, Float64Array>>,
  states: readonly string[],
): GroupFit {
  const last = states.map((state) => [state, values[state]![values[state]!.length - 1]!]);
  return { ...group, initial: Object.fromEntries(last) as Record<string, number> };
}

function warningsOf(group: GroupFit, draws: PathDraws, periods: number, recordEnd: number): Warning[] {
  const found: Warning[] = [];
  const loose = group.estimates.filter((estimate) => estimate.standardError === undefined);
  if (loose.length > 0)
    found.push({
      code: "constants-not-determined",
      message: `The record does not determine ${loose.map((e) => e.name).join(", ")}: the bands understate what is not known.`,
    });
  if (draws.discarded > 0.01 * draws.paths)
    found.push({
      code: "draws-discarded",
      message: `${draws.discarded} draws were discarded (a constant out of bounds or a path out of range) for ${draws.paths} kept.`,
    });
  if (periods > recordEnd)
    found.push({
      code: "longer-than-record",
      message: `Projection of ${periods} periods from ${recordEnd} observed: treat beyond ${recordEnd} as conditional.`,
    });
  return found;
}
