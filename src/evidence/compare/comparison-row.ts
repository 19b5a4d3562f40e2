import { type Fit, freeUnknowns, problemOf } from "../../estimate/index.js";

/** One rival of a comparison, all its groups together. */
export interface ComparisonRow {
  /** Which of the fits given, from 0. */
  readonly place: number;
  /** What the rival is called: its rule, and what else tells it from the others. */
  readonly rule: string;
  /** n: values compared, of all groups. */
  readonly count: number;
  /** Free unknowns; those that groups share once, sigma of least squares not counted. */
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
  const { criteria, groups } = fit;
  const jacobian = ownScale && problemOf(fit).scale.log ? sumOfLogs(fit) : 0;
  return {
    place,
    count: criteria.count,
    parameters: freeUnknowns(fit),
    sumOfSquares: groups.reduce((sum, group) => sum + group.sumOfSquares, 0),
    logLikelihood: criteria.logLikelihood - jacobian,
    aic: criteria.aic + 2 * jacobian,
    aicCorrected: criteria.aicCorrected + 2 * jacobian,
    bic: criteria.bic + 2 * jacobian,
    undetermined: groups.some((group) => group.estimates.some((e) => e.standardError === undefined)),
  };
}

/** What brings a likelihood of logarithms to the record's own scale. */
function sumOfLogs({ groups }: Fit): number {
  return groups.reduce(
    (sum, { points }) => points.reduce((all, { observed }) => all + Math.log(observed), sum),
    0,
  );
}
