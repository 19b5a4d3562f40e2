import type { Fit, GroupFit } from "../../estimate/index.js";
import { type Minimum, quantile, type RandomStream } from "../../numeric/index.js";
import { compileRule } from "../../rule/index.js";
import { recordDrawer } from "../refit/record-drawer.js";
import { type Refitter, refitProblem, refitter } from "../refit/refitter.js";

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
  readonly refits: number;
  /** Draws or refits that came to nothing. */
  readonly failed: number;
  readonly level: number;
  readonly unknowns: readonly RecoveredUnknown[];
}

/**
 * Draws records from the fitted rule, fits each again, and tells bias and coverage of every unknown.
 *
 * Covered means that one refit with the unknown held at its true value stays under the cut of the profile, which is
 * when the profile interval holds it.
 *
 * @param wanted - records to refit.
 */
export function recovery(fit: Fit, group: GroupFit, wanted: number, stream: RandomStream): Recovery {
  const problem = refitProblem(fit, group);
  const compiled = compileRule(fit.rule);
  const again = refitter(problem, compiled);
  const draw = recordDrawer(problem, compiled, again.compared, group.sigma);
  const truth = Float64Array.from(group.estimates, (estimate) => estimate.value);
  const found = Array.from(truth, () => [] as number[]);
  const covered = new Int32Array(truth.length);
  const values = new Float64Array(again.compared.values.length);
  const free = fit.options.cut === "chi-square" ? 0 : truth.length;
  let failed = 0;
  const note = (best: Minimum): void => {
    const most = best.sumOfSquares * (1 + group.cut / (again.compared.count - free));
    for (let i = 0; i < truth.length; i++) {
      found[i]!.push(best.estimates[i]!);
      covered[i] = covered[i]! + (heldSum(again, best.estimates, i, truth[i]!) <= most ? 1 : 0);
    }
  };
  while (found[0]!.length < wanted && failed < wanted) {
    const best = draw(stream, values) ? refitTo(again, values, truth) : undefined;
    if (best === undefined) failed++;
    else note(best);
  }
  const refits = found[0]!.length;
  const unknowns = group.estimates.map(({ name }, i) =>
    recovered(name, truth[i]!, Float64Array.from(found[i]!), covered[i]! / refits),
  );
  return { refits, failed, level: fit.options.level ?? 0.95, unknowns };
}

function refitTo(again: Refitter, values: Float64Array, start: Float64Array): Minimum | undefined {
  again.use(values);
  const best = again.minimise(start);
  return best.stop.kind === "failed" ? undefined : best;
}

/** Least sum of squares with unknown `i` held at a value. */
function heldSum(again: Refitter, from: Float64Array, i: number, value: number): number {
  const lower = again.limits.lower.slice();
  const upper = again.limits.upper.slice();
  const start = from.slice();
  lower[i] = value;
  upper[i] = value;
  start[i] = value;
  const { sumOfSquares } = again.minimise(start, { lower, upper });
  return Number.isNaN(sumOfSquares) ? Number.POSITIVE_INFINITY : sumOfSquares;
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
