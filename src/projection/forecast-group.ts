import { type Fit, type GroupFit, problemOf } from "../estimate/index.js";
import { type RandomStream, reporter } from "../numeric/index.js";
import { indexOf, labelAt, labelsAt, periodWords } from "../record/index.js";
import { dependsOnPeriod, type StateBound } from "../rule/index.js";
import { type CentralPath, centralPath } from "./central-path.js";
import { keepLimit } from "./check-run.js";
import { blockStreams } from "./ensemble/block-streams.js";
import { type EnsembleRun, runEnsemble } from "./ensemble/ensemble.js";
import { type GatheredState, type Gatherer, gatherer } from "./ensemble/gather.js";
import { type PlacedWatch, passagesOf, placedWatches } from "./ensemble/placed-watches.js";
import { type FitGround, fitGround } from "./fit-ground.js";
import type { ForecastOptions, ForecastSettings } from "./forecast-options.js";
import { forecastWarnings } from "./forecast-warnings.js";
import type { Scenario } from "./inputs/scenarios.js";
import { centralLevels, levelSource } from "./levels.js";
import { noiseDraw } from "./noise/noise.js";
import { type DrawnStarts, drawnStarts, type UnknownsDraw, unknownsDraw } from "./parameters/drawn-starts.js";
import { type Predictability, predictabilityOf } from "./predictability.js";
import type { GroupForecast, ProjectedState } from "./projected-group.js";
import { refuseFilteredStart, refuseFrom, refuseNoPath } from "./refusals.js";
import { observableRange, runBounds } from "./state-range.js";

type Settled = ForecastOptions & ForecastSettings;

/** Carries one group forward under every scenario, with the same random numbers in each. */
export function forecastGroup(
  fit: Fit,
  group: GroupFit,
  scenarios: readonly Scenario[],
  options: Settled,
  stream: RandomStream,
): readonly GroupForecast[] {
  const after = startsAfter(fit, group, options.from);
  const grounds = scenarios.map(({ plans }) => fitGround(fit, group, options.periods, plans, after));
  const source = unknownsDraw(fit, group);
  const seeds = blockStreams(stream, options.paths);
  return grounds.map((ground, i) => projected(fit, ground, scenarios[i]!, options, source, seeds));
}

/** The index of the period to start after; undefined for the last recorded one. */
function startsAfter(fit: Fit, { group }: GroupFit, asked: ForecastOptions["from"]): number | undefined {
  const from = typeof asked === "object" ? asked.byGroup[group] : asked;
  if (from === undefined) return undefined;
  const { axis, index } = fit.observations.groups.find(({ name }) => name === group)!;
  const last = index[index.length - 1]!;
  const found = indexOf(axis, from);
  if (found === undefined || found < 0 || found > last)
    throw refuseFrom(from, labelAt(axis, 0), labelAt(axis, last));
  if (problemOf(fit).kind === "state-space" && found < last) throw refuseFilteredStart(from);
  return found;
}

function projected(
  fit: Fit,
  ground: FitGround,
  scenario: Scenario,
  options: Settled,
  source: UnknownsDraw,
  seeds: readonly RandomStream[],
): GroupForecast {
  const { rule } = fit;
  const { group, from, recordEnd, periods } = ground;
  const central = centralPath(ground);
  if (central.stop !== undefined && central.stop.row + from <= recordEnd)
    throw refuseNoPath(group.group, rule.text);
  // A jump leaves the stream where it is, so every scenario begins with the same numbers.
  const streams = seeds.map((each) => each.jump());
  const starts = drawnStarts(fit, ground, source, options.paths, streams);
  const levels = levelSource(ground, starts);
  const watches = placedWatches(rule, options.watch, levels, ground.present);
  const { mean, future, process, bounds } = runBoth(fit, ground, starts, options, streams, watches);
  const means = mean.states();
  const left = future.ended() / options.paths;
  const predictability = predicted(ground, starts, means[0]!.standardDeviation[ground.present + 1]!);
  const horizon = predictability?.predictionHorizon ?? Number.POSITIVE_INFINITY;
  // Beyond the horizon of predictability a single path means nothing.
  const within = (value: number, row: number): number =>
    row <= ground.present + horizon ? value : Number.NaN;
  const shown = central.values.map((values) => values.map(within));
  const index = Array.from({ length: periods + 1 }, (_, t) => from + t);
  const { axis, time: recordedTime } = ground.recorded;
  const time = index.map((t) => recordedTime[0]! + t * axis.step.every);
  return {
    group: group.group,
    scenario: scenario.name,
    plans: scenario.plans,
    axis,
    index,
    time,
    ...(axis.counts !== "numbers" && { labels: labelsAt(axis, index) }),
    recordEnd,
    states: projectedStates(fit, ground, shown, means, future.states()),
    ensemble: {
      paths: options.paths,
      periods,
      mean: means.flatMap((state) => state.paths ?? []),
      future: future.states().flatMap((state) => state.paths ?? []),
      process: process.process,
      passed: process.passed,
      central: central.kept.map((kept) => ({ ...kept, values: kept.values.map(within) })),
      levels: {
        central: centralLevels(ground),
        paths: levels,
      },
      discarded: starts.discarded,
    },
    passages: passagesOf(watches, process.passages),
    left,
    leftError: Math.sqrt((left * (1 - left)) / options.paths),
    ...(predictability && { predictability }),
    warnings: forecastWarnings({
      group,
      starts,
      central: { ...central, values: shown },
      scenario: scenario.name,
      period: (row) => periodWords(axis, from + row),
      left,
      bounds,
      passed: process.passed,
      predictability,
      ground,
      asked: options.periods,
    }),
  };
}

/** A state in its own unit, and what the record would read of it in the record's. */
function projectedStates(
  fit: Fit,
  { factors }: FitGround,
  central: CentralPath["values"],
  means: readonly GatheredState[],
  futures: readonly GatheredState[],
): readonly ProjectedState[] {
  const { rule, observations } = fit;
  return rule.states.map((state, s) => {
    const { unit } = observations.states.find((each) => each.name === state)!;
    const own = { state, central: central[s]! };
    const factor = factors[s];
    if (factor === undefined)
      return {
        ...own,
        unit,
        median: futures[s]!.median,
        bands: [...means[s]!.bands, ...futures[s]!.bands],
      };
    return {
      ...own,
      unit: rule.units[state] ?? "",
      median: means[s]!.median,
      bands: means[s]!.bands,
      observed: {
        factor: factor.name,
        unit,
        central: central[s]!.map((value) => factor.value * value),
        bands: futures[s]!.bands,
      },
    };
  });
}

interface BothRuns {
  readonly mean: Gatherer;
  readonly future: Gatherer;
  /** What events are read from: the run that has the errors of the process, without those of observations. */
  readonly process: Gatherer;
  readonly bounds: readonly StateBound[];
}

/** The same starts run twice: by the rule alone, and with the errors of single periods or observations. */
function runBoth(
  fit: Fit,
  ground: FitGround,
  starts: DrawnStarts,
  options: Settled,
  streams: readonly RandomStream[],
  watches: readonly PlacedWatch[],
): BothRuns {
  const { rule } = fit;
  const states = rule.states.length;
  const quantities = rule.quantities.length;
  const { change, reading } = problemOf(fit).group(ground.group.group).noise;
  const alike = change.every((noise) => noise === undefined);
  const keep = starts.paths * (ground.periods + 1) * (states + quantities) <= keepLimit;
  const shared = {
    levels: options.levels,
    states,
    quantities,
    paths: starts.paths,
    periods: ground.periods,
    keep,
    watches,
  };
  const mean = gatherer({ ...shared, kind: "mean path" });
  const future = gatherer({ ...shared, kind: "future observation", keepProcess: keep && !alike });
  const draws = change.map((noise) => noise && noiseDraw(noise));
  const bounds = runBounds(rule, draws);
  const report = reporter(options);
  const half = (part: number) => (done: number, of: number) => report(part * of + done, 2 * of);
  const none = rule.states.map(() => undefined);
  const run: Omit<EnsembleRun, "change" | "reading" | "onRow"> = {
    compiled: ground.compiled,
    bounds,
    observable: observableRange(rule),
    width: ground.initial.length,
    inputs: ground.inputs,
    from: ground.from,
    periods: ground.periods,
    starts,
    quantities: keep || watches.some(({ place }) => place >= states) ? quantities : 0,
    streams,
  };
  runEnsemble({ ...run, change: none, reading: none, onRow: mean.onRow, onProgress: half(0) });
  runEnsemble({
    ...run,
    change: draws,
    reading: reading.map((noise) => noise && noiseDraw(noise)),
    factors: starts.factors,
    spread: starts.spread,
    // Those that a decision meets, which draws its starts once and runs many settings from there.
    streams: streams.map((each) => each.jump()),
    onRow: future.onRow,
    onProgress: half(1),
  });
  return { mean, future, process: alike ? mean : future, bounds };
}

function predicted(ground: FitGround, starts: DrawnStarts, firstError: number): Predictability | undefined {
  const { rule, compiled, parameters, initial } = ground;
  if (rule.inputs.length > 0 || dependsOnPeriod(rule)) return undefined;
  const own = { paths: 1, size: parameters.length, parameters, initial };
  return predictabilityOf(compiled, initial.length, own, starts, firstError);
}
