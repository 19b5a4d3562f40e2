import {
  type InitialValues,
  type InputPlans,
  initialFrom,
  initialVector,
  inputsFrom,
  parametersBySlot,
  type RunStart,
  runStart,
  type StartOptions,
} from "../dynamics/index.js";
import { type RunHooks, randomStream, reporter } from "../numeric/index.js";
import { labelsAt, type PeriodAxis, periodWords } from "../record/index.js";
import { compileRule, type ProcessNoise, type Rule } from "../rule/index.js";
import { centralPath, type Ground } from "./central-path.js";
import { checkRun, keepLimit } from "./check-run.js";
import { blockStreams } from "./ensemble/block-streams.js";
import { runEnsemble } from "./ensemble/ensemble.js";
import { gatherer } from "./ensemble/gather.js";
import { passagesOf, placedWatches, type Watch } from "./ensemble/placed-watches.js";
import { growthWarnings } from "./growth-warnings.js";
import { type Scenario, type Scenarios, scenariosOf } from "./inputs/scenarios.js";
import { levelSource, startNames } from "./levels.js";
import { type Noise, noiseDraw } from "./noise/noise.js";
import { ruleNoise } from "./noise/rule-noise.js";
import type { GroupForecast } from "./projected-group.js";
import { rangeWarnings } from "./range-warnings.js";
import { observableRange, runBounds } from "./state-range.js";

/** Options of `simulate`. */
export interface SimulateOptions extends StartOptions, RunHooks {
  /** Parameters by name; those that the rule holds fixed may be left out. */
  readonly parameters?: Readonly<Record<string, number>>;
  /** First values by state, with lags a list, oldest first; those that the rule states may be left out. */
  readonly initial?: InitialValues;
  /** Whole periods to run. */
  readonly periods: number;
  /** By input: what it will be, from the first period on. */
  readonly inputs?: InputPlans;
  /** Several plans of inputs side by side, by the name of the scenario, run with the same random numbers. */
  readonly scenarios?: Scenarios;
  /** By state: the random change of each period; default what the rule says. */
  readonly noise?: Readonly<Record<string, Noise | ProcessNoise>>;
  /** By state: the error of an observation, reported and not carried on. */
  readonly observationNoise?: Readonly<Record<string, Noise>>;
  /** Random paths; default 4000, or 1 where nothing is random. */
  readonly paths?: number;
  /** Levels of the bands, each between 0 and 1; default [0.5, 0.8, 0.95]. */
  readonly levels?: readonly number[];
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
  /** Levels whose first passage is followed, for runs with more paths than can be kept. */
  readonly watch?: readonly Watch[];
}

/** Paths of a rule at given parameters, with bands across them. */
export interface Simulation {
  readonly kind: "simulation";
  readonly rule: Rule;
  readonly parameters: Readonly<Record<string, number>>;
  /** The axis of its periods. */
  readonly axis: PeriodAxis;
  readonly options: {
    readonly periods: number;
    readonly paths: number;
    readonly seed: number;
    readonly levels: readonly number[];
    readonly period: string;
  };
  /** One a scenario. */
  readonly groups: readonly GroupForecast[];
}

/**
 * Runs a rule from given parameters: one path without random change, and many with it, period by period.
 *
 * Paths run in blocks of 1024, each with its own stream: more periods leave the earlier numbers as they are, more paths
 * the earlier whole blocks, and scenarios meet the same random numbers. Memory holds one value a path and state, so a million paths fit; the
 * paths themselves are kept where there are at most five million values.
 *
 * @returns by scenario the central path, median, bands [periods + 1] in the state's unit, and first passages.
 * @throws {ModelError} `periods-not-whole` | `paths-not-whole` | `missing-value` | `unknown-name` |
 *   `future-input-missing` | `plan-not-readable` | `start-not-readable` | `noise-not-readable`.
 * @example
 * const rule = recurrence("N[t+1] = R*N");
 * simulate(rule, { parameters: { R: 1.1 }, initial: { N: 100 }, periods: 10, noise: { N: { distribution: "lognormal", sd: 0.2, centre: "mean" } } });
 */
export function simulate(rule: Rule, options: SimulateOptions): Simulation {
  const { periods, levels = [0.5, 0.8, 0.95], seed = 1 } = options;
  const parameters = parametersBySlot(rule, options.parameters);
  const change = ruleNoise(rule, parameters, options.noise);
  const random = change.some((noise) => noise !== undefined) || options.observationNoise !== undefined;
  const paths = options.paths ?? (random ? 4000 : 1);
  checkRun(periods, paths, levels);
  const start = runStart(options);
  const { from, axis } = start;
  const initial = initialVector(rule, initialFrom(rule, start, options.initial));
  const compiled = compileRule(rule);
  const settings = { periods, paths, seed, levels, period: axis.unit };
  const groups = scenariosOf(options).map(({ name, plans }) => {
    const inputs = inputsFrom(rule, start, periods, plans);
    const own = { startNames: startNames(rule), firstValues: {}, present: 0 };
    const ground = { rule, compiled, parameters, initial, inputs, from, periods, ...own };
    return simulated(ground, start, { name, plans }, { ...options, ...settings }, change);
  });
  return {
    kind: "simulation",
    rule,
    parameters: Object.fromEntries(rule.parameters.map((name, i) => [name, parameters[i]!])),
    axis,
    options: settings,
    groups,
  };
}

type Settled = Omit<SimulateOptions, "period"> &
  Required<Pick<SimulateOptions, "paths" | "seed" | "levels">> & { readonly period: string };

function simulated(
  ground: Ground,
  { from, axis, recorded }: RunStart,
  { name: scenario, plans }: Scenario,
  options: Settled,
  change: readonly (Noise | undefined)[],
): GroupForecast {
  const { rule, compiled, periods } = ground;
  const { paths } = options;
  const central = centralPath(ground);
  const states = rule.states.length;
  const quantities = rule.quantities.length;
  const keep = paths * (periods + 1) * (states + quantities) <= keepLimit;
  const starts = {
    paths,
    size: ground.parameters.length,
    parameters: ground.parameters,
    initial: ground.initial,
  };
  const levels = levelSource(ground, starts);
  const watches = placedWatches(rule, options.watch, levels, 0);
  const draws = change.map((noise) => noise && noiseDraw(noise));
  const bounds = runBounds(rule, draws);
  const found = gatherer({
    kind: "simulated path",
    levels: options.levels,
    states,
    quantities,
    paths,
    periods,
    keep,
    watches,
  });
  runEnsemble({
    compiled,
    bounds,
    observable: observableRange(rule),
    width: ground.initial.length,
    inputs: ground.inputs,
    from,
    periods,
    starts,
    change: draws,
    reading: rule.states.map((state) => {
      const noise = options.observationNoise?.[state];
      return noise && noiseDraw(noise);
    }),
    quantities: keep || watches.some(({ place }) => place >= states) ? quantities : 0,
    streams: blockStreams(randomStream(options.seed), paths),
    onRow: found.onRow,
    onProgress: reporter(options),
  });
  const gathered = found.states();
  const index = Array.from({ length: periods + 1 }, (_, t) => from + t);
  const first = recorded?.time[0] ?? (axis.counts === "numbers" ? axis.origin : 0);
  const left = found.ended() / paths;
  return {
    group: "",
    scenario,
    plans,
    axis,
    index,
    time: index.map((t) => first + t * axis.step.every),
    ...(axis.counts !== "numbers" && { labels: labelsAt(axis, index) }),
    recordEnd: from,
    states: rule.states.map((state, s) => ({
      state,
      unit: rule.units[state] ?? "",
      central: central.values[s]!,
      median: gathered[s]!.median,
      bands: gathered[s]!.bands,
      ...(gathered[s]!.growth && { growth: gathered[s]!.growth }),
    })),
    ensemble: {
      paths,
      periods,
      mean: [],
      future: keep ? gathered.map((state) => state.paths!) : [],
      process: found.process,
      passed: found.passed,
      central: central.kept,
      levels: { central: levels, paths: levels },
      discarded: 0,
    },
    passages: passagesOf(watches, found.passages),
    left,
    leftError: Math.sqrt((left * (1 - left)) / paths),
    warnings: [
      ...rangeWarnings({
        rule,
        central,
        period: (row) => periodWords(axis, from + row),
        left,
        paths,
        bounds,
        passed: found.passed,
      }),
      ...growthWarnings(rule, gathered, options.period),
    ],
  };
}
