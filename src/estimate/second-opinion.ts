import type { Fit } from "./fit.js";
import { bySquares } from "./options/fit-options.js";
import type { GroupFit } from "./result/group-fit.js";
import { prepared } from "./systems/prepared.js";
import { unknownsOf } from "./unknowns/unknowns.js";

/** Loaded when first asked for: most sessions fit many rules before one is shown. */
const otherSolver = (): typeof import("ml-levenberg-marquardt") => require("ml-levenberg-marquardt");

/** What an independent solver says of a fit. */
export interface SecondOpinion {
  /** Correct digits on which every estimate agrees, at most 11; undefined where the other solver failed. */
  readonly digits: number | undefined;
  readonly sentence: string;
}

/**
 * Refits one group with ml-levenberg-marquardt, from every estimate displaced by one standard error, and counts the
 * digits on which the two agree.
 *
 * Unknowns are scaled to 1 and `errorTolerance` is 0, without which that solver stops early on records in small units.
 */
export function secondOpinion(fit: Fit, group: GroupFit): SecondOpinion {
  if (!isOneLeastSquares(fit, group)) return { digits: undefined, sentence: notLeastSquares };
  const recorded = fit.observations.groups.find((each) => each.name === group.group)!;
  const unknowns = unknownsOf(fit.rule, fit.options);
  const { rows } = prepared(fit.rule, recorded, unknowns, fit.options);
  const values = group.estimates.map((estimate) => estimate.value);
  const scales = values.map((value) => Math.abs(value) || 1);
  const start = group.estimates.map(
    (estimate, i) => (estimate.value + (estimate.standardError ?? 0.01 * scales[i]!)) / scales[i]!,
  );
  const at = new Float64Array(values.length);
  const residuals = (scaled: readonly number[]): ((i: number) => number) => {
    scaled.forEach((value, i) => {
      at[i] = value * scales[i]!;
    });
    rows.prepare(at, false);
    const all = Float64Array.from({ length: rows.count }, (_, i) => -rows.residualAt(i));
    return (i) => all[i]!;
  };
  const x = Array.from({ length: rows.count }, (_, i) => i);
  try {
    const { parameterValues } = otherSolver().levenbergMarquardt({ x, y: x.map(() => 0) }, residuals, {
      initialValues: start,
      errorTolerance: 0,
      maxIterations: 100,
      damping: 1e-2,
      gradientDifference: 1e-6,
      centralDifference: true,
    });
    return opinionOf(
      values,
      parameterValues.map((value, i) => value * scales[i]!),
    );
  } catch (cause) {
    return { digits: undefined, sentence: `The second solver gave no answer (${(cause as Error).message}).` };
  }
}

const notLeastSquares = "No second solver: the fit is not one of least squares of a group on its own.";

function isOneLeastSquares({ options }: Fit, { estimates }: GroupFit): boolean {
  const alone = (options.groups ?? "separate") === "separate";
  return (
    alone && options.robust !== true && bySquares(options) && estimates.every(({ role }) => role !== "scale")
  );
}

function opinionOf(ours: readonly number[], theirs: readonly number[]): SecondOpinion {
  const digits = Math.min(
    11,
    ...ours.map((value, i) => Math.max(0, -Math.log10(Math.abs(value - theirs[i]!) / Math.abs(value)))),
  );
  const whole = Math.floor(digits);
  return { digits: whole, sentence: `A second solver (ml-levenberg-marquardt) agrees to ${whole} digits.` };
}
