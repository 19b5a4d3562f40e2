import {
  quantile,
  type RandomStream,
  type RunHooks,
  randomStream,
  type Tick,
  ticker,
} from "../../numeric/index.js";
import { fewDrawsError, noDrawsError, sharedParametersError } from "../errors.js";
import { type Fit, problemOf } from "../fit.js";
import type { Interval } from "../intervals/interval.js";
import type { RecordDraw, Refitter } from "../problem/refitter.js";
import type { GroupFit } from "../result/group-fit.js";
import { type ResampledErrors, residualDraw } from "./residual-draw.js";

/** Options of `bootstrap`. */
export interface BootstrapOptions extends RunHooks {
  /**
   * Errors of the simulated records: normal, the fit's own residuals one by one, or in blocks of neighbours;
   * default "parametric".
   */
  readonly errors?: ResampledErrors;
  /** Length of a block; default the cube root of the number of values, rounded up. */
  readonly block?: number;
  /** Refits a group; default 999. */
  readonly resamples?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
  /** Confidence level of the intervals, between 0 and 1; default that of the fit. */
  readonly level?: number;
}

/** How the estimates of one unknown scattered over the refits. */
export interface BootstrapRow {
  readonly group: string;
  readonly name: string;
  readonly estimate: number;
  /** Mean of the refits minus the estimate. */
  readonly bias: number;
  readonly standardError: number;
  readonly interval: Interval;
}

/** Refits of simulated records. */
export interface Bootstrap {
  readonly kind: "bootstrap";
  readonly errors: ResampledErrors;
  readonly seed: number;
  readonly rows: readonly BootstrapRow[];
  /** Refits that were used, and that found no optimum, over all groups. */
  readonly used: number;
  readonly failed: number;
}

/**
 * Refits each group of a fit to records simulated from it, and gives the middle share of the estimates as interval
 * (percentiles, definition 7).
 *
 * @throws {ModelError} `groups-together` for groups that share parameters; `not-simulated` for censored values and weighted
 *   counts; `no-residuals` for residuals of counts or of a state-space fit; `too-few-draws`.
 * @see Davison and Hinkley (1997), Bootstrap Methods and their Application, sections 7.3 and 8.2.
 * @example bootstrap(crowdingFit, { resamples: 99 }).rows[0].name; // "r"
 */
export function bootstrap(fit: Fit, options: BootstrapOptions = {}): Bootstrap {
  const { errors = "parametric", resamples = 999, seed = 1 } = options;
  if (!(Number.isInteger(resamples) && resamples >= 20)) throw fewDrawsError(resamples);
  const problem = problemOf(fit);
  let stream = randomStream(seed);
  const tick = ticker(options, fit.groups.length * resamples);
  let used = 0;
  const rows = fit.groups.flatMap((fitted) => {
    const own = stream;
    stream = stream.jump();
    const again = problem.group(fitted.group).refitter();
    if (again === undefined) throw sharedParametersError();
    const draw = errors === "parametric" ? again.draw : residualDraw(again, errors, options.block);
    if (draw === undefined) throw noDrawsError();
    const refits = refitsOf(again, draw, resamples, tick, own);
    used += refits.length;
    return rowsOf(fitted, refits, options.level ?? problem.level);
  });
  const failed = fit.groups.length * resamples - used;
  return { kind: "bootstrap", errors, seed, rows, used, failed };
}

/** The estimates of the refits, as reported. */
function refitsOf(
  { minimise, reported, at }: Refitter,
  draw: RecordDraw,
  resamples: number,
  tick: Tick,
  stream: RandomStream,
): readonly Float64Array[] {
  const found: Float64Array[] = [];
  for (let k = 0; k < resamples; k++) {
    tick();
    if (draw(stream) === undefined) continue;
    const { estimates, stop } = minimise(at);
    if (stop.kind === "converged") found.push(estimates.map((value, i) => reported(i, value)));
  }
  return found;
}

function rowsOf(fitted: GroupFit, refits: readonly Float64Array[], level: number): BootstrapRow[] {
  return fitted.estimates.map(({ name, value }, i) => {
    const sorted = Float64Array.from(refits, (estimates) => estimates[i]!).sort();
    const mean = sorted.reduce((sum, each) => sum + each, 0) / sorted.length;
    const squares = sorted.reduce((sum, each) => sum + (each - mean) ** 2, 0);
    return {
      group: fitted.group,
      name,
      estimate: value,
      bias: mean - value,
      standardError: Math.sqrt(squares / (sorted.length - 1)),
      interval: {
        kind: "bootstrap",
        level,
        lower: quantile(sorted, (1 - level) / 2),
        upper: quantile(sorted, (1 + level) / 2),
        note: "",
      },
    };
  });
}
