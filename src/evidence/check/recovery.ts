import { type Fit, type GroupFit, resampler } from "../../estimate/index.js";
import { quantile, type RandomStream, type Tick } from "../../numeric/index.js";
import { recordDrawer } from "../refit/record-drawer.js";
import { refitter } from "../refit/refitter.js";

/** How well one unknown is found again in records drawn from the fitted rule. */
export interface RecoveredUnknown {
  readonly name: string;
  /** The value that the records were drawn with: the estimate. */
  readonly truth: number;
  /** Mean of the refits less the truth, and the same for their median, in the unknown's unit. */
  readonly bias: number;
  readonly medianBias: number;
  /** Standard deviation of the refits. */
  readonly deviation: number;
  /** Share of records whose interval holds the truth, and its Monte-Carlo error. */
  readonly coverage: number;
  readonly coverageError: number;
}

/** What refits of drawn records tell about a fit's intervals. */
export interface Recovery {
  /** Records that could be drawn and refitted. */
  readonly resamples: number;
  /** Draws or refits that came to nothing. */
  readonly failed: number;
  readonly level: number;
  readonly parameters: readonly RecoveredUnknown[];
}

/** One record drawn and fitted: its estimates, and whether each one's interval holds the truth. */
interface Refit {
  readonly estimates: readonly number[];
  readonly holds: readonly boolean[];
}

/**
 * Draws records from the fitted rule, fits each again, and tells bias and coverage of every unknown.
 *
 * Covered means that one refit with the unknown held at its true value stays under the cut of the profile, which is
 * when the profile interval holds it.
 *
 * @param wanted - records to refit.
 * @returns undefined where the fit is neither one of least squares nor of both kinds of error.
 */
export function recovery(
  fit: Fit,
  group: GroupFit,
  wanted: number,
  stream: RandomStream,
  tick: Tick = () => undefined,
): Recovery | undefined {
  const attempt = squaresAttempt(fit, group) ?? likelihoodAttempt(fit, group);
  if (attempt === undefined) return undefined;
  const found: Refit[] = [];
  let failed = 0;
  while (found.length < wanted && failed < wanted) {
    const refit = attempt(stream);
    tick();
    if (refit === undefined) failed++;
    else found.push(refit);
  }
  const unknowns = group.estimates.map(({ name, value }, i) => {
    const held = found.filter(({ holds }) => holds[i]).length / found.length;
    return recovered(
      name,
      value,
      Float64Array.from(found, ({ estimates }) => estimates[i]!),
      held,
    );
  });
  return { resamples: found.length, failed, level: fit.options.level ?? 0.95, parameters: unknowns };
}

type Attempt = (stream: RandomStream) => Refit | undefined;

function squaresAttempt(fit: Fit, group: GroupFit): Attempt | undefined {
  const again = refitter(fit, group);
  if (again === undefined) return undefined;
  const { at } = again;
  const draw = recordDrawer(fit, again, group.sigma);
  const values = new Float64Array(again.recorded.length);
  return (stream) => {
    if (!draw(stream, values)) return undefined;
    const { estimates, stop, sumOfSquares } = again.minimise(at);
    if (stop.kind === "failed") return undefined;
    const most = sumOfSquares * (1 + group.cut / (again.rows.count - at.length));
    const held = (i: number): number => again.minimiseHeld(estimates, i, at[i]!).sumOfSquares;
    return { estimates: Array.from(estimates), holds: Array.from(at, (_, i) => held(i) <= most) };
  };
}

/** Fits of both kinds of error are drawn and searched by `estimate` itself. */
function likelihoodAttempt(fit: Fit, group: GroupFit): Attempt | undefined {
  if (group.filter === undefined) return undefined;
  const { refit, reported, holdsTruth } = resampler(fit, group, "parametric", undefined);
  return (stream) => {
    const { estimates, stop } = refit(stream);
    if (stop.kind === "failed" || holdsTruth === undefined) return undefined;
    return {
      estimates: Array.from(estimates, (value, i) => reported(i, value)),
      holds: Array.from(estimates, (_, i) => holdsTruth(estimates, i)),
    };
  };
}

function recovered(name: string, truth: number, found: Float64Array, coverage: number): RecoveredUnknown {
  const count = found.length;
  const mean = found.reduce((sum, value) => sum + value, 0) / count;
  const squares = found.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return {
    name,
    truth,
    bias: mean - truth,
    medianBias: count > 0 ? quantile(found.sort(), 0.5) - truth : Number.NaN,
    deviation: Math.sqrt(squares / (count - 1)),
    coverage,
    coverageError: Math.sqrt((coverage * (1 - coverage)) / count),
  };
}
