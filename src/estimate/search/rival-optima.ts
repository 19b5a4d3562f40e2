import type { Lowest, Objective } from "./objective.js";
import { isStopped, type SearchBounds } from "./search-bounds.js";

/** Ends closer than this, relative, are the same optimum. */
const same = 1e-4;
/** Slope of an optimum by the logarithm of an unknown, in units of the variance. */
const level = 0.05;

/**
 * Further optima among the ends of searches that lie within 2 log-likelihood units of the best, each once. An end counts
 * where a second search from it stays and the objective has no slope left: one that stopped short on a plateau, or ran
 * off up to where the searches reach, is no optimum.
 *
 * @param within - as far as the searches go inside the admitted values.
 * @param variance - what an increase of the objective is divided by.
 */
export function rivalOptima(
  objective: Objective,
  best: { readonly at: Float64Array; readonly value: number },
  searches: readonly Lowest[],
  admitted: SearchBounds,
  within: SearchBounds,
  variance: number,
): readonly Lowest[] {
  const near = 4 * variance;
  const found: Lowest[] = [];
  const isKnown = (end: Lowest): boolean =>
    [{ ...end, estimates: best.at, value: best.value }, ...found].some((other) => sameEnd(other, end, near));
  for (const search of searches) {
    if (!(search.value - best.value <= near) || isKnown(search)) continue;
    const end = objective.minimise(search.estimates, within.lower, within.upper);
    const isLevel = end.estimates.every((value, i) => {
      if (value === admitted.lower[i] || value === admitted.upper[i]) return true;
      return (
        !isStopped(value, i, admitted, within) && Math.abs(objective.slope(i) * value) <= level * variance
      );
    });
    if (end.stop.kind === "converged" && isLevel && !isKnown(end)) found.push(end);
  }
  return found;
}

/** The ends of searches other than the best, each once. */
export function otherEnds(best: Float64Array, searches: readonly Lowest[]): readonly Float64Array[] {
  const found: Float64Array[] = [];
  for (const { estimates } of searches)
    if (![best, ...found].some((other) => alike(other, estimates))) found.push(estimates);
  return found;
}

/** Ends with the same value are one optimum: the fitted values agree, along an edge at infinity the parameters may not. */
function sameEnd(a: Lowest, b: Lowest, within: number): boolean {
  return Math.abs(a.value - b.value) <= 1e-6 * within || alike(a.estimates, b.estimates);
}

function alike(a: Float64Array, b: Float64Array): boolean {
  return a.every((value, i) => Math.abs(value - b[i]!) <= same * Math.max(Math.abs(value), Math.abs(b[i]!)));
}
