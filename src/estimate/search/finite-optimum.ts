import { profileWalk } from "../intervals/profile-walk.js";
import type { Lowest, Objective } from "./objective.js";
import { isStopped, type SearchBounds } from "./search-bounds.js";

/** A rise of the objective that does not count, in units of the variance. */
const negligible = 1e-5;
/** By how much an unknown is led outwards, and back in each step. */
const outwards = 10;
const back = 4;
/** Steps back over which the objective must stay level before an unknown counts as run off, and steps taken. */
const levelSteps = 2;
const steps = 20;
/** Unknowns that change by more than this factor on the way go along. */
const goesAlong = 2;

/** An optimum that may lie beyond any limit, taken at values where the objective stops falling. */
export interface FiniteOptimum {
  readonly best: Lowest;
  /** [unknowns]: 1 or -1 where the unknown goes up or down without end as the objective falls to its lowest, else 0. */
  readonly unbounded: Int8Array;
}

/**
 * Takes an optimum that a search followed towards infinity back to where the objective begins to rise. Each unknown that
 * is known worse than its own size is led away, the others at their best: outwards, where nothing may rise, and back; where
 * the first steps back bring no rise and a later one does, it had run off.
 *
 * @returns the lowest value with the point led back to, which explains the record as well.
 * @param errors - standard errors; NaN where there is none.
 * @param variance - what an increase of the objective is divided by.
 */
export function finiteOptimum(
  objective: Objective,
  best: Lowest,
  admitted: SearchBounds,
  within: SearchBounds,
  errors: Float64Array,
  variance: number,
): FiniteOptimum {
  const unbounded = new Int8Array(errors.length);
  const loose = Array.from(errors, (_, i) => i)
    .filter((i) => best.estimates[i] !== 0 && !(errors[i]! < Math.abs(best.estimates[i]!)))
    .sort((i, j) => Math.abs(best.estimates[j]!) - Math.abs(best.estimates[i]!));
  let at = best;
  for (const i of loose) {
    if (unbounded[i] !== 0) continue;
    const found = ledBack(objective, at, admitted, within, variance, i);
    if (found === undefined) continue;
    const ratios = at.estimates.map((value, k) => value / found.inner[k]!);
    ratios.forEach((ratio, k) => {
      if (Math.abs(Math.log(ratio)) > Math.log(goesAlong))
        unbounded[k] = Math.sign(at.estimates[k]!) * (ratio > 1 ? 1 : -1);
    });
    at = { ...at, estimates: found.level };
  }
  return { best: at, unbounded };
}

/** The innermost point of unknown i where nothing has risen, and one farther in; undefined where it has not run off. */
function ledBack(
  objective: Objective,
  best: Lowest,
  admitted: SearchBounds,
  within: SearchBounds,
  variance: number,
  i: number,
): { readonly level: Float64Array; readonly inner: Float64Array } | undefined {
  const { estimates } = best;
  const problem = {
    objective,
    estimates,
    value: best.value,
    // Nothing is let out beyond where the search ended: a rise because another unknown is stopped is told by that.
    ...within,
    within,
    unbounded: new Int8Array(estimates.length),
    variance,
    covariance: new Float64Array(estimates.length ** 2).fill(Number.NaN),
    others: [],
    starts: [],
    separable: [],
    effort: { left: Number.POSITIVE_INFINITY },
    cut: Number.POSITIVE_INFINITY,
    firmCut: Number.POSITIVE_INFINITY,
  };
  const walk = profileWalk(problem, i);
  const farther = outwards * estimates[i]!;
  const inReach = farther > within.lower[i]! && farther < within.upper[i]!;
  const rise = inReach ? walk.at(farther).increase : 0;
  // Where the rule breaks down for a number too large, nothing is told of what lies before.
  if (rise > negligible && Number.isFinite(rise)) return undefined;
  const stopped = isStopped(estimates[i]!, i, admitted, within);
  let level = estimates;
  for (let k = 1; k <= steps; k++) {
    const here = walk.at(estimates[i]! / back ** k);
    if (here.increase > negligible) {
      const other = here.estimates.some((value, j) => j !== i && isStopped(value, j, admitted, within));
      return (stopped || k > levelSteps) && !other ? { level, inner: here.estimates } : undefined;
    }
    level = here.estimates;
  }
  return undefined;
}
