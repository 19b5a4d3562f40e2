import { quantile, type RandomStream, randomStream } from "../../numeric/index.js";
import { type Fit, problemOf } from "../fit.js";
import type { Interval } from "../intervals/interval.js";
import type { RecordDraw, Refitter } from "../problem/refitter.js";
import { refuseFewDraws, refuseNoDraws, refuseSharedParameters } from "../refusals.js";
import type { GroupFit } from "../result/group-fit.js";
import { type ResampledErrors, residualDraw } from "./residual-draw.js";

/** Options of `bootstrap`. */
export interface BootstrapOptions {
  /** Normal errors (`parametric`, default), the fit's own residuals one by one, or in runs of neighbours (`block`). */
  readonly errors?: ResampledErrors;
  /** Length of a run; default the cube root of the number of values, rounded up. */
  readonly block?: number;
  /** Refits a group; default 999. */
  readonly resamples?: number;
  /** Default 1. */
  readonly seed?: number;
  /** Default that of the fit. */
  readonly level?: number;
  /** Told after every hundredth refit; a false answer stops the work, and what was drawn so far is used. */
  readonly onProgress?: (done: number, of: number) => unknown;
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
  if (!(Number.isInteger(resamples) && resamples >= 20)) throw refuseFewDraws(resamples);
  const problem = problemOf(fit);
  let stream = randomStream(seed);
  let used = 0;
  const rows = fit.groups.flatMap((fitted) => {
    const own = stream;
    stream = stream.jump();
    const again = problem.group(fitted.group).refitter();
    if (again === undefined) throw refuseSharedParameters();
    const draw = errors === "parametric" ? again.draw : residualDraw(again, errors, options.block);
    if (draw === undefined) throw refuseNoDraws();
    const refits = refitsOf(again, draw, { ...options, resamples }, own);
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
  { resamples, onProgress }: BootstrapOptions & { resamples: number },
  stream: RandomStream,
): readonly Float64Array[] {
  const found: Float64Array[] = [];
  for (let k = 0; k < resamples; k++) {
    if (k % 100 === 0 && onProgress?.(k, resamples) === false) break;
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
