import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import { quantile, type RandomStream, type Tick } from "../../numeric/index.js";

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

/**
 * Draws records from the fitted rule, fits each again, and tells bias and coverage of every unknown.
 *
 * Covered means that one refit with the unknown held at its true value stays under the cut of the profile, which is
 * when the profile interval holds it.
 *
 * @param wanted - records to refit.
 * @returns undefined where no records can be drawn from the fit: censored values, weighted counts, groups together.
 */
export function recovery(
  fit: Fit,
  group: GroupFit,
  wanted: number,
  stream: RandomStream,
  tick: Tick = () => undefined,
): Recovery | undefined {
  const { level, group: problemOfGroup } = problemOf(fit);
  const again = problemOfGroup(group.group).refitter();
  if (again?.draw === undefined) return undefined;
  const { draw, minimise, covers, reported, at } = again;
  const found: { readonly estimates: readonly number[]; readonly holds: readonly boolean[] }[] = [];
  let failed = 0;
  while (found.length < wanted && failed < wanted) {
    const refit = draw(stream) && minimise(at);
    tick();
    if (refit === undefined || refit.stop.kind === "failed") failed++;
    else
      found.push({
        estimates: Array.from(refit.estimates, (value, i) => reported(i, value)),
        holds: Array.from(at, (value, i) => covers(refit, i, value)),
      });
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
  return { resamples: found.length, failed, level, parameters: unknowns };
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
