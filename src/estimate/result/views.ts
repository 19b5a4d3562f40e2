import { ruleLabel } from "../../rule/index.js";
import type { Fit } from "../fit.js";
import type { Criteria } from "./criteria.js";
import type { Estimate } from "./estimate-of.js";
import type { FitPoint } from "./fit-points.js";
import type { GroupFit } from "./group-fit.js";

/** A row of the estimates view: one unknown of one group. */
export interface EstimateRow extends Omit<Estimate, "trace"> {
  readonly group: string;
}

/** What the rows of parameters that groups share say instead of a group. */
const allGroups = "all groups";

/**
 * Every unknown of a fit, group by group. Of groups fitted together what holds for all of them comes first: the common
 * parameters, or their means and standard deviations among groups and sigma.
 */
export function estimates(fit: Fit): readonly EstimateRow[] {
  const { population } = fit;
  const common = (population ?? []).map((each) => rowOf(allGroups, each));
  const shared = new Set(isMixed(fit) ? [] : population?.map(({ name }) => name));
  const own = fit.groups.flatMap((group) =>
    group.estimates.filter(({ name }) => !shared.has(name)).map((each) => rowOf(group.group, each)),
  );
  return [...common, ...own];
}

function rowOf(group: string, { trace: _, ...estimate }: Estimate): EstimateRow {
  return { group, ...estimate };
}

/** Whether parameters differ among groups, which have estimates of their own beside the means. */
const isMixed = ({ population }: Fit): boolean => population?.some(({ role }) => role === "scale") === true;

/** A row of the points view: one compared value of one group. */
export interface PointRow extends FitPoint {
  readonly group: string;
}

/** Every residual of every group of a fit. */
export function points(fit: Fit): readonly PointRow[] {
  return fit.groups.flatMap((group) => group.points.map((point) => ({ group: group.group, ...point })));
}

/** A row of the summary view: one group, or all groups that were fitted together. */
export interface SummaryRow {
  /** "" where there is one group, or where all were fitted together. */
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

/** Size, scatter, likelihood and why the search stopped: a row for every likelihood of the fit. */
export function summary(fit: Fit): readonly SummaryRow[] {
  const [first] = fit.groups;
  if (fit.population !== undefined && first !== undefined)
    return [
      summaryOf(fit, { ...first, group: "", sumOfSquares: squaresOf(fit) }, fit.criteria, freeUnknowns(fit)),
    ];
  return fit.groups.map((group) =>
    summaryOf(fit, group, group.criteria ?? fit.criteria, group.estimates.length),
  );
}

function summaryOf(fit: Fit, group: GroupFit, criteria: Criteria, parameters: number): SummaryRow {
  return {
    group: group.group,
    rule: ruleLabel(fit.rule),
    count: criteria.count,
    parameters,
    sumOfSquares: group.sumOfSquares,
    sigma: group.sigma,
    logLikelihood: criteria.logLikelihood,
    aic: criteria.aic,
    aicCorrected: criteria.aicCorrected,
    stop: group.stop.kind,
  };
}

function squaresOf({ groups }: Fit): number {
  return groups.reduce((sum, each) => sum + each.sumOfSquares, 0);
}

/** How many unknowns a fit has found, sigma of least squares not counted; those that groups share once. */
export function freeUnknowns({ groups, population }: Fit): number {
  const own = groups.map(
    ({ estimates }) =>
      estimates.filter(({ role }) => population === undefined || role !== "parameter").length,
  );
  return own.reduce((sum, each) => sum + each, population?.length ?? 0);
}
