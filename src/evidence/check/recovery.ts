import type { Fit, GroupFit } from "../../estimate/index.js";
import { type Minimum, quantile, type RandomStream } from "../../numeric/index.js";
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
 * @returns undefined where the fit is not one of least squares.
 */
export function recovery(
  fit: Fit,
  group: GroupFit,
  wanted: number,
  stream: RandomStream,
): Recovery | undefined {
  const again = refitter(fit, group);
  if (again === undefined) return undefined;
  const { at } = again;
  const draw = recordDrawer(fit, again, group.sigma);
  const found = Array.from(at, () => [] as number[]);
  const covered = new Int32Array(at.length);
  const values = new Float64Array(again.recorded.length);
  const free = fit.options.cut === "chi-square" ? 0 : at.length;
  let failed = 0;
  const note = (best: Minimum): void => {
    const most = best.sumOfSquares * (1 + group.cut / (again.rows.count - free));
    for (let i = 0; i < at.length; i++) {
      found[i]!.push(best.estimates[i]!);
      const held = again.minimiseHeld(best.estimates, i, at[i]!).sumOfSquares;
      covered[i] = covered[i]! + (held <= most ? 1 : 0);
    }
  };
  while (found[0]!.length < wanted && failed < wanted) {
    const best = draw(stream, values) ? again.minimise(at) : undefined;
    if (best === undefined || best.stop.kind === "failed") failed++;
    else note(best);
  }
  const refits = found[0]!.length;
  const unknowns = group.estimates.map(({ name }, i) =>
    recovered(name, at[i]!, Float64Array.from(found[i]!), covered[i]! / refits),
  );
  return { refits, failed, level: fit.options.level ?? 0.95, unknowns };
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
