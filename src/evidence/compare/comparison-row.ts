import type { Fit } from "../../estimate/index.js";

/** One rival of a comparison. Sums run over the groups, each with its own parameters and sigma. */
export interface ComparisonRow {
  /** Which of the fits given, from 0. */
  readonly place: number;
  /** What the rival is called: its rule, and what else tells it from the others. */
  readonly rule: string;
  /** n: values compared, of all groups. */
  readonly count: number;
  readonly parameters: number;
  readonly sumOfSquares: number;
  /** On the scale that the comparison states. */
  readonly logLikelihood: number;
  readonly aic: number;
  readonly aicCorrected: number;
  /** k ln n - 2 logLik, k counting sigma. */
  readonly bic: number;
  /** AICc above the lowest. */
  readonly difference: number;
  /** Akaike weight: exp(-difference/2), the rivals' weights adding up to 1. */
  readonly weight: number;
  /** True where a parameter of the rule is not determined by the record. */
  readonly undetermined: boolean;
}

type GroupFit = Fit["groups"][number];

/**
 * The rivals by increasing AICc.
 *
 * @param ownScale - brings fits on the log scale back to the record's own by the Jacobian, -sum ln y.
 */
export function comparisonRows(
  fits: readonly Fit[],
  labels: readonly string[],
  ownScale: boolean,
): readonly ComparisonRow[] {
  const raw = fits
    .map((fit, place) => ({ ...rowOf(fit, place, ownScale), rule: labels[place]! }))
    .sort((a, b) => a.aicCorrected - b.aicCorrected);
  const lowest = raw[0]!.aicCorrected;
  const weight = (row: { aicCorrected: number }): number => Math.exp((lowest - row.aicCorrected) / 2) || 0;
  const total = raw.reduce((sum, row) => sum + weight(row), 0);
  return raw.map((row) => ({ ...row, difference: row.aicCorrected - lowest, weight: weight(row) / total }));
}

function rowOf(
  fit: Fit,
  place: number,
  ownScale: boolean,
): Omit<ComparisonRow, "rule" | "difference" | "weight"> {
  const sum = (of: (group: GroupFit) => number): number =>
    fit.groups.reduce((total, group) => total + of(group), 0);
  const jacobian = ownScale && fit.options.distribution === "lognormal" ? sum(logOfValues) : 0;
  const logLikelihood = sum((group) => group.criteria.logLikelihood) - jacobian;
  return {
    place,
    count: sum((group) => group.count),
    parameters: sum((group) => group.estimates.length),
    sumOfSquares: sum((group) => group.sumOfSquares),
    logLikelihood,
    aic: sum((group) => group.criteria.aic) + 2 * jacobian,
    aicCorrected: sum((group) => group.criteria.aicCorrected) + 2 * jacobian,
    bic: sum((group) => group.criteria.counted * Math.log(group.count)) - 2 * logLikelihood,
    undetermined: fit.groups.some((group) => group.estimates.some((e) => e.standardError === undefined)),
  };
}

function logOfValues(group: GroupFit): number {
  return group.points.reduce((total, point) => total + Math.log(point.observed), 0);
}
