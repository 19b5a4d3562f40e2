import { quantile } from "../numeric/index.js";
import type { CompiledRule } from "../rule/index.js";
import type { Starts } from "./ensemble/ensemble.js";

/** Whether nearby paths part, by the largest Lyapunov exponent over the parameters drawn. */
export interface Predictability {
  /** Per period, at the estimates: the rate at which a small error grows. */
  readonly lyapunovExponent: number;
  /** 95% over drawn parameters. */
  readonly lower: number;
  readonly upper: number;
  /** Share of drawn parameters with a positive exponent on a bounded path, and its Monte-Carlo error. */
  readonly chaotic: number;
  readonly chaoticError: number;
  /** Periods ahead after which a single path means nothing; undefined where no error grows. */
  readonly predictionHorizon: number | undefined;
  /** First state in the long run: where its values lie, 95%, whatever the start; absent unless errors grow. */
  readonly longRun?: { readonly lower: number; readonly median: number; readonly upper: number };
}

/** Periods that are let pass before the exponent is taken, and over which it is taken. */
const settling = 200;
const length = 400;
/** Drawn parameters that are looked at first, and how many where one of those comes near to parting. */
const firstLooks = 40;
const looks = 200;
const near = -0.05;

interface LongRun {
  readonly exponent: number;
  readonly bounded: boolean;
  /** First state over the last `length` periods. */
  readonly values: Float64Array;
}

/**
 * Follows the long run of the rule for drawn parameters.
 *
 * @param central - the estimates, as one start.
 * @param firstError - standard deviation of the first state one period ahead, from the parameters alone.
 * @see horizon: ln(tolerance / first error) / exponent periods, the tolerance being the standard deviation of the
 *   long run; see Strogatz (1994), Nonlinear Dynamics and Chaos, section 9.3 (from memory).
 */
export function predictabilityOf(
  compiled: CompiledRule,
  width: number,
  central: Starts,
  drawn: Starts,
  firstError: number,
): Predictability {
  const follow = follower(compiled, width, central.size);
  const own = follow(central, 0);
  const runs = Array.from({ length: Math.min(firstLooks, drawn.paths) }, (_, path) => follow(drawn, path));
  if (runs.some((run) => run.exponent > near))
    for (let path = firstLooks; path < Math.min(looks, drawn.paths); path++) runs.push(follow(drawn, path));
  const exponents = Float64Array.from(runs, (run) => run.exponent).sort();
  const wild = runs.filter(isChaotic);
  const chaotic = wild.length / runs.length;
  const shared = {
    lyapunovExponent: own.exponent,
    lower: quantile(exponents, 0.025),
    upper: quantile(exponents, 0.975),
    chaotic,
    chaoticError: Math.sqrt((chaotic * (1 - chaotic)) / runs.length),
  };
  if (wild.length === 0) return { ...shared, predictionHorizon: undefined };
  const pooled = Float64Array.from(wild.flatMap((run) => Array.from(run.values))).sort();
  const rates = Float64Array.from(wild, (run) => run.exponent).sort();
  const periods = Math.log(deviationOf(pooled) / firstError) / quantile(rates, 0.5);
  return {
    ...shared,
    predictionHorizon: isChaotic(own) || chaotic >= 0.5 ? Math.max(1, Math.floor(periods)) : undefined,
    longRun: {
      lower: quantile(pooled, 0.025),
      median: quantile(pooled, 0.5),
      upper: quantile(pooled, 0.975),
    },
  };
}

/** An error that grows while the path stays in bounds; growth without bound is no chaos. */
function isChaotic(run: LongRun): boolean {
  return run.bounded && run.exponent > 0.01;
}

/** Follows one start: the rule, and a small difference carried along it and brought back to length 1. */
function follower(
  compiled: CompiledRule,
  width: number,
  size: number,
): (starts: Starts, path: number) => LongRun {
  const unknowns = size + width;
  const state = new Float64Array(width);
  const table = new Float64Array(2 * width);
  const slopes = new Float64Array(2 * width * unknowns);
  const tangent = new Float64Array(width);
  return (starts, path) => {
    const shared = starts.parameters.length === size;
    const parameters = shared
      ? starts.parameters
      : starts.parameters.subarray(path * size, (path + 1) * size);
    const own = starts.initial.length === width ? 0 : path * width;
    state.set(starts.initial.subarray(own, own + width));
    tangent.fill(1 / Math.sqrt(width));
    const values = new Float64Array(length);
    let sum = 0;
    let early = 0;
    let late = 0;
    for (let t = 0; t < settling + length; t++) {
      compiled.pathWithSensitivities(state, parameters, [], 0, 1, table, slopes);
      const growth = carried(tangent, slopes, width, size);
      state.set(table.subarray(width));
      const extent = Math.abs(state[0]!);
      if (t < settling) early = Math.max(early, extent);
      else {
        late = Math.max(late, extent);
        sum += Math.log(growth);
        values[t - settling] = state[0]!;
      }
    }
    return { exponent: sum / length, bounded: late <= 1.5 * early, values };
  };
}

/** Moves the difference one period on; gives the factor by which it has grown and brings it back to length 1. */
function carried(tangent: Float64Array, slopes: Float64Array, width: number, size: number): number {
  const unknowns = size + width;
  const next = new Float64Array(width);
  let squares = 0;
  for (let i = 0; i < width; i++) {
    const row = (width + i) * unknowns + size;
    let sum = 0;
    for (let k = 0; k < width; k++) sum += slopes[row + k]! * tangent[k]!;
    next[i] = sum;
    squares += sum * sum;
  }
  const growth = Math.sqrt(squares);
  for (let i = 0; i < width; i++) tangent[i] = growth > 0 ? next[i]! / growth : 1 / Math.sqrt(width);
  return growth;
}

function deviationOf(values: Float64Array): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return Math.sqrt(squares / values.length);
}
