import { ruleLabel } from "../../rule/index.js";
import type { Fit } from "../fit.js";
import type { Estimate } from "./estimate-of.js";
import type { FitPoint } from "./fit-points.js";

/** A row of the estimates view: one unknown of one group. */
export interface EstimateRow extends Omit<Estimate, "trace"> {
  readonly group: string;
}

/** Every unknown of every group of a fit. */
export function estimates(fit: Fit): readonly EstimateRow[] {
  return fit.groups.flatMap((group) =>
    group.estimates.map(({ trace: _, ...estimate }) => ({ group: group.group, ...estimate })),
  );
}

/** A row of the points view: one compared value of one group. */
export interface PointRow extends FitPoint {
  readonly group: string;
}

/** Every residual of every group of a fit. */
export function points(fit: Fit): readonly PointRow[] {
  return fit.groups.flatMap((group) => group.points.map((point) => ({ group: group.group, ...point })));
}

/** A row of the summary view: one group. */
export interface SummaryRow {
  readonly group: string;
  readonly rule: string;
  readonly count: number;
  readonly parameters: number;
  readonly sumOfSquares: number;
  readonly sigma: number;
  readonly logLikelihood: number;
  readonly aic: number;
  readonly aicCorrected: number;
  readonly stop: string;
}

/** One row a group: size, scatter, likelihood and why the search stopped. */
export function summary(fit: Fit): readonly SummaryRow[] {
  return fit.groups.map((group) => ({
    group: group.group,
    rule: ruleLabel(fit.rule),
    count: group.count,
    parameters: group.estimates.length,
    sumOfSquares: group.sumOfSquares,
    sigma: group.sigma,
    logLikelihood: group.criteria.logLikelihood,
    aic: group.criteria.aic,
    aicCorrected: group.criteria.aicCorrected,
    stop: group.stop.kind,
  }));
}
