import { minimiseSquares, type RandomStream, squaresWorkspace } from "../../numeric/index.js";
import type { Fit } from "../fit.js";
import { bySquares } from "../options/fit-options.js";
import { refuseNoResiduals } from "../refusals.js";
import type { GroupFit } from "../result/group-fit.js";
import { likelihoodObjective } from "../search/likelihood-objective.js";
import type { Lowest } from "../search/objective.js";
import { stateSpaceProblem } from "../state-space/state-space-problem.js";
import { refitProblem } from "./refit-problem.js";
import { drawnResiduals, type ErrorDraw, normalErrors, recordMaker } from "./simulate-record.js";
import { stateSpaceMaker } from "./simulate-state-space.js";

/** How errors of simulated records are drawn. */
export type ResampledErrors = "parametric" | "residual" | "block";

/** A group's fit, ready to be done again on records simulated from it. */
export interface Resampler {
  /** One record drawn and fitted. */
  readonly refit: (stream: RandomStream) => Pick<Lowest, "estimates" | "stop">;
  /**
   * Whether the interval that the record drawn last would give unknown i holds the value it was drawn with; for fits by
   * likelihood. One refit with the unknown held there tells: the profile holds what lies under its cut.
   */
  readonly holdsTruth?: (found: Float64Array, i: number) => boolean;
  /** An unknown as it is reported. */
  readonly reported: (i: number, value: number) => number;
}

/**
 * Makes a group's fit ready to be resampled: a fit by least squares from its errors or residuals, a state-space fit from
 * both its errors.
 *
 * @throws {ModelError} `not-by-least-squares` for other likelihoods and groups together; `no-residuals` where residuals of
 *   a state-space fit are asked for, which has one-step predictions instead.
 */
export function resampler(
  fit: Fit,
  fitted: GroupFit,
  errors: ResampledErrors,
  block: number | undefined,
): Resampler {
  if (fitted.filter === undefined || bySquares(fit.options))
    return squaresResampler(fit, fitted, errors, block);
  if (errors !== "parametric") throw refuseNoResiduals();
  const { unknowns, space, at, rule, group, options } = stateSpaceProblem(fit, fitted);
  const objective = likelihoodObjective(space.minusTwice, unknowns);
  objective.covariance(at);
  const make = stateSpaceMaker(rule, group, options, fitted);
  return {
    reported: (i, value) => (unknowns.rooted[i] ? Math.sqrt(value) : value),
    refit(stream) {
      space.rows.take(make(stream));
      return objective.minimise(at, unknowns.lower, unknowns.upper);
    },
    holdsTruth(found, i) {
      const lower = unknowns.lower.slice();
      const upper = unknowns.upper.slice();
      const from = found.slice();
      lower[i] = at[i]!;
      upper[i] = at[i]!;
      from[i] = at[i]!;
      return objective.minimise(from, lower, upper).value - objective.value(found) <= fitted.cut;
    },
  };
}

function squaresResampler(
  fit: Fit,
  fitted: GroupFit,
  errors: ResampledErrors,
  block: number | undefined,
): Resampler {
  const problem = refitProblem(fit, fitted);
  const { rule, group, unknowns, rows, system, at } = problem;
  const { lower, upper } = unknowns;
  const make = recordMaker(rule, group, unknowns, rows, problem.options);
  const workspace = squaresWorkspace(system.size);
  rows.prepare(at, false);
  const residuals = Float64Array.from({ length: rows.count }, (_, i) => rows.residualAt(i));
  const run = errors === "block" ? (block ?? Math.ceil(Math.cbrt(rows.count))) : 1;
  const draw: ErrorDraw =
    errors === "parametric" ? normalErrors(rows, fitted.sigma) : drawnResiduals(rows, residuals, run);
  return {
    reported: (_, value) => value,
    refit(stream) {
      rows.take(make(at, draw(stream)));
      return minimiseSquares(system, at, { lower, upper, workspace });
    },
  };
}
