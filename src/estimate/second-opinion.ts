import { type Fit, problemOf } from "./fit.js";
import type { Refitter } from "./problem/refitter.js";
import type { GroupFit } from "./result/group-fit.js";

/** Loaded when first asked for: most sessions fit many rules before one is shown. */
const otherSolver = (): typeof import("ml-levenberg-marquardt") => require("ml-levenberg-marquardt");

/** What an independent solver says of a fit. */
export interface SecondOpinion {
  /** Largest difference between the two, in standard errors of the estimate; undefined where the other solver failed. */
  readonly difference: number | undefined;
  readonly sentence: string;
}

/**
 * Refits one group with ml-levenberg-marquardt, from every estimate displaced by one standard error, and tells by how
 * many standard errors the two differ at most.
 *
 * Residuals are divided by sigma and unknowns by their standard errors, so that units do not matter.
 *
 * @returns undefined where there is nothing to set beside: a fit by another likelihood, of groups together, robust, or
 *   with an estimate that the record does not determine or that lies on a bound.
 */
export function secondOpinion(fit: Fit, group: GroupFit): SecondOpinion | undefined {
  const { kind, refitter } = problemOf(fit).group(group.group);
  const again = kind === "least-squares" && group.sigma > 0 ? refitter() : undefined;
  if (again === undefined || again.robust || !isInside(again, group)) return undefined;
  const { rows, at } = again;
  const errors = group.estimates.map(({ standardError }) => standardError!);
  const moved = new Float64Array(at.length);
  const residuals = (steps: readonly number[]): ((i: number) => number) => {
    steps.forEach((step, i) => {
      moved[i] = at[i]! + step * errors[i]!;
    });
    rows.prepare(moved, false);
    const all = Float64Array.from({ length: rows.count }, (_, i) => -rows.residualAt(i) / group.sigma);
    return (i) => all[i]!;
  };
  const x = Array.from({ length: rows.count }, (_, i) => i);
  try {
    const { parameterValues } = otherSolver().levenbergMarquardt({ x, y: x.map(() => 0) }, residuals, {
      initialValues: errors.map(() => 1),
      errorTolerance: 0,
      maxIterations: 100,
      damping: 1e-2,
      gradientDifference: 1e-5,
      centralDifference: true,
    });
    return opinionOf(Math.max(...parameterValues.map(Math.abs)));
  } catch (cause) {
    return {
      difference: undefined,
      sentence: `The second solver gave no answer (${(cause as Error).message}).`,
    };
  }
}

/** Whether every estimate has a standard error and lies inside its bounds. */
function isInside({ unknowns: { lower, upper }, at }: Refitter, { estimates }: GroupFit): boolean {
  return estimates.every(
    ({ standardError }, i) => standardError !== undefined && at[i]! > lower[i]! && at[i]! < upper[i]!,
  );
}

/** Differences below this part of a standard error are told as that: the second solver's own precision. */
const precise = 1e-6;

function opinionOf(difference: number): SecondOpinion {
  const shown = difference < precise ? `less than ${precise}` : difference.toPrecision(2);
  return {
    difference,
    sentence: `A second solver (ml-levenberg-marquardt) differs by ${shown} standard errors at most.`,
  };
}
