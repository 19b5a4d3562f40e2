import { type RandomStream, type RunHooks, randomStream, type Tick, ticker } from "../numeric/index.js";
import type { Observations, ObservedGroup } from "../record/index.js";
import { refuseNoDensity } from "./refusals.js";

/** Options of `densityDependence`. */
export interface DensityOptions extends RunHooks {
  /** Name of the state; default the only one. */
  readonly state?: string;
  /** Records drawn without density dependence; default 1999. */
  readonly resamples?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
  /**
   * Confidence above which density dependence is called, between 0 and 1; 0.95 is a test at 5%; default 0.95.
   */
  readonly level?: number;
}

/** Whether growth falls with the level in one group. */
export interface GroupDensity {
  readonly group: string;
  /** Steps of one period that were used. */
  readonly steps: number;
  /** ln(N'/N) = intercept + slope N by least squares. */
  readonly intercept: number;
  readonly slope: number;
  /** Slope over its standard error. */
  readonly statistic: number;
  /** Of one as low in records that grow by chance alone. */
  readonly probability: number;
  readonly found: boolean;
  readonly sentence: string;
}

/** A test of density dependence. */
export interface DensityDependence {
  readonly kind: "density-dependence";
  readonly resamples: number;
  readonly level: number;
  readonly groups: readonly GroupDensity[];
  readonly sentence: string;
}

/**
 * Tests whether growth a period falls with the level, against growth with a steady mean and chance.
 *
 * The slope of ln(N'/N) on N leans below zero even where the level does not matter, because the same error makes a level
 * high and the next growth low; a t-test therefore finds density dependence far too often. Here the slope is held against
 * slopes from records drawn by ln N' = ln N + a + s Z, with a and s from the record.
 *
 * @throws {ModelError} `no-density-test`.
 * @see Dennis, B. and Taper, M. L. (1994), Density dependence in time series observations of natural populations:
 *   estimation and testing, Ecological Monographs 64: the parametric bootstrap likelihood ratio test.
 * @example densityDependence(counts).groups[0].found; // true
 */
export function densityDependence(
  observations: Observations,
  options: DensityOptions = {},
): DensityDependence {
  const { resamples = 1999, seed = 1, level = 0.95 } = options;
  const state = options.state ?? observations.states[0]!.name;
  const tick = ticker(options, observations.groups.length * resamples);
  let stream = randomStream(seed);
  const groups = observations.groups.map((group) => {
    const own = stream;
    stream = stream.jump();
    return groupDensity(group, state, { resamples, level, tick }, own);
  });
  const sentence = groups.map((group) => group.sentence).join(" ");
  return {
    kind: "density-dependence",
    resamples,
    level,
    groups,
    sentence,
  };
}

function groupDensity(
  group: ObservedGroup,
  state: string,
  { resamples, level, tick }: { readonly resamples: number; readonly level: number; readonly tick: Tick },
  stream: RandomStream,
): GroupDensity {
  const values = group.values[state];
  const logs = values && Float64Array.from(values, Math.log);
  const line = logs && lineOf(logs, group.index);
  if (logs === undefined || line === undefined || logs.some((log) => !Number.isFinite(log)))
    throw refuseNoDensity(group.name, state);
  let below = 1;
  const drawn = new Float64Array(logs.length);
  for (let k = 0; k < resamples; k++) {
    tick();
    walk(logs[0]!, line.growth, line.deviation, group.index, stream, drawn);
    if ((lineOf(drawn, group.index)?.statistic ?? 0) <= line.statistic) below++;
  }
  const probability = below / (resamples + 1);
  const found = {
    steps: line.steps,
    intercept: line.intercept,
    slope: line.slope,
    statistic: line.statistic,
  };
  const sentence = sentenceOf(group.name, probability, level, line.steps);
  return { group: group.name, ...found, probability, found: probability <= 1 - level, sentence };
}

/** Regression of growth on level, over pairs one period apart; undefined where fewer than 4 of them. */
function lineOf(
  logs: Float64Array,
  index: Int32Array,
): (Pick<GroupDensity, "steps" | "intercept" | "slope" | "statistic"> & Growth) | undefined {
  const levels: number[] = [];
  const growths: number[] = [];
  for (let i = 1; i < logs.length; i++) {
    if (index[i]! - index[i - 1]! !== 1) continue;
    levels.push(Math.exp(logs[i - 1]!));
    growths.push(logs[i]! - logs[i - 1]!);
  }
  const steps = levels.length;
  if (steps < 4) return undefined;
  const meanLevel = levels.reduce((sum, level) => sum + level, 0) / steps;
  const growth = growths.reduce((sum, each) => sum + each, 0) / steps;
  let [across, along, up] = [0, 0, 0];
  levels.forEach((level, i) => {
    along += (level - meanLevel) ** 2;
    across += (level - meanLevel) * (growths[i]! - growth);
    up += (growths[i]! - growth) ** 2;
  });
  const slope = across / along;
  const error = Math.sqrt((up - slope * across) / (steps - 2) / along);
  const deviation = Math.sqrt(up / (steps - 1));
  return { steps, intercept: growth - slope * meanLevel, slope, statistic: slope / error, growth, deviation };
}

interface Growth {
  /** Mean and standard deviation of ln(N'/N). */
  readonly growth: number;
  readonly deviation: number;
}

/** A record that grows by chance about a steady mean, at the recorded periods. */
function walk(
  start: number,
  growth: number,
  deviation: number,
  index: Int32Array,
  stream: RandomStream,
  out: Float64Array,
): void {
  out[0] = start;
  for (let i = 1; i < out.length; i++) {
    const span = index[i]! - index[i - 1]!;
    out[i] = out[i - 1]! + span * growth + Math.sqrt(span) * deviation * stream.normal();
  }
}

function sentenceOf(group: string, probability: number, level: number, steps: number): string {
  const who = group === "" ? "" : `${group}: `;
  const chance = probability < 0.001 ? "less than 0.1%" : `${(100 * probability).toFixed(1)}%`;
  return probability <= 1 - level
    ? `${who}Growth falls with the level: chance alone gives a fall as steep in ${chance} of records (${steps} steps).`
    : `${who}The record does not show that growth falls with the level: chance alone gives a fall as steep in ${chance} of records (${steps} steps).`;
}
