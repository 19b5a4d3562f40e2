import { type Fit, type GroupFit, problemOf } from "../estimate/index.js";
import type { RandomStream } from "../numeric/index.js";
import { indexOf, labelAt, labelsAt, periodWords } from "../record/index.js";
import { dependsOnPeriod } from "../rule/index.js";
import { type CentralPath, centralPath, stateLimits } from "./central-path.js";
import { keepLimit } from "./check-run.js";
import { blockStreams } from "./ensemble/block-streams.js";
import { type EnsembleRun, runEnsemble } from "./ensemble/ensemble.js";
import { type Gatherer, gatherer } from "./ensemble/gather.js";
import { passagesOf, placedWatches } from "./ensemble/placed-watches.js";
import { type FitGround, fitGround } from "./fit-ground.js";
import type { ForecastOptions, ForecastSettings } from "./forecast-options.js";
import { forecastWarnings } from "./forecast-warnings.js";
import type { Scenario } from "./inputs/scenarios.js";
import { noiseDraw } from "./noise/noise.js";
import { type DrawnStarts, drawnStarts, type UnknownsDraw, unknownsDraw } from "./parameters/drawn-starts.js";
import { type Predictability, predictabilityOf } from "./predictability.js";
import type { GroupForecast } from "./projected-group.js";
import { refuseFilteredStart, refuseFrom, refuseNoPath } from "./refusals.js";

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
  const { rule, observations } = fit;
  const { group, from, recordEnd, periods } = ground;
  const central = centralPath(ground);
  if (central.stop !== undefined && central.stop.row + from <= recordEnd)
    throw refuseNoPath(group.group, rule.text);
  // A jump leaves the stream where it is, so every scenario begins with the same numbers.
  const streams = seeds.map((each) => each.jump());
  const starts = drawnStarts(fit, ground, source, options.paths, streams);
  const { mean, future } = runBoth(fit, ground, starts, options, streams);
  const means = mean.states();
  const futures = future.states();
  const left = future.ended[periods]! / options.paths;
  const ahead = recordEnd - from + 1;
  const predictability = predicted(ground, starts, means[0]!.standardDeviation[ahead]!);
  const shown = withHorizon(central, predictability, recordEnd - from);
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
    states: rule.states.map((state, s) => ({
      state,
      unit: observations.states.find((each) => each.name === state)!.unit,
      central: shown[s]!,
      median: futures[s]!.median,
      bands: [...means[s]!.bands, ...futures[s]!.bands],
    })),
    ensemble: {
      paths: options.paths,
      periods,
      mean: means.flatMap((state) => state.paths ?? []),
      future: futures.flatMap((state) => state.paths ?? []),
      discarded: starts.discarded,
    },
    passages: passagesOf(placedWatches(rule, options.watch), passagesFor(fit, group, mean, future)),
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
      predictability,
      ground,
      asked: options.periods,
    }),
  };
}

/** The same starts run twice: by the rule alone, and with the errors of single periods or readings. */
function runBoth(
  fit: Fit,
  ground: FitGround,
  starts: DrawnStarts,
  options: Settled,
  streams: readonly RandomStream[],
): { mean: Gatherer; future: Gatherer } {
  const { rule } = fit;
  const none = rule.states.map(() => undefined);
  const gathered = (kind: "mean path" | "future observation"): Gatherer =>
    gatherer({
      kind,
      levels: options.levels,
      states: rule.states.length,
      paths: starts.paths,
      periods: ground.periods,
      keep: starts.paths * (ground.periods + 1) * rule.states.length <= keepLimit,
      watches: placedWatches(rule, options.watch),
    });
  const mean = gathered("mean path");
  const future = gathered("future observation");
  const half = (part: number) => (done: number, of: number) => options.onProgress?.(part * of + done, 2 * of);
  const run: Omit<EnsembleRun, "change" | "reading" | "onRow"> = {
    compiled: ground.compiled,
    states: rule.states.length,
    width: ground.initial.length,
    inputs: ground.inputs,
    from: ground.from,
    periods: ground.periods,
    starts,
    limits: stateLimits(rule),
    streams,
  };
  const { change, reading } = problemOf(fit).group(ground.group.group).noise;
  runEnsemble({ ...run, change: none, reading: none, onRow: mean.onRow, onProgress: half(0) });
  runEnsemble({
    ...run,
    change: change.map((noise) => noise && noiseDraw(noise)),
    reading: reading.map((noise) => noise && noiseDraw(noise)),
    spread: starts.spread,
    onRow: future.onRow,
    onProgress: half(1),
  });
  return { mean, future };
}

/** An answer about the process is read from the process: with reading errors alone, from the paths without them. */
function passagesFor(fit: Fit, { group }: GroupFit, mean: Gatherer, future: Gatherer): Gatherer["passages"] {
  const { change } = problemOf(fit).group(group).noise;
  return change.every((noise) => noise === undefined) ? mean.passages : future.passages;
}

function predicted(ground: FitGround, starts: DrawnStarts, firstError: number): Predictability | undefined {
  const { rule, compiled, parameters, initial } = ground;
  if (rule.inputs.length > 0 || dependsOnPeriod(rule)) return undefined;
  const own = { paths: 1, size: parameters.length, parameters, initial };
  return predictabilityOf(compiled, initial.length, own, starts, firstError);
}

/** The central path up to the horizon of predictability. */
function withHorizon(
  central: CentralPath,
  predictability: Predictability | undefined,
  recordEnd: number,
): CentralPath["values"] {
  const horizon = predictability?.predictionHorizon;
  if (horizon === undefined) return central.values;
  return central.values.map((values) =>
    values.map((value, t) => (t <= recordEnd + horizon ? value : Number.NaN)),
  );
}
