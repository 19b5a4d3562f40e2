import type { Fit } from "../estimate/index.js";
import { refuseOneFit, refuseUnlikeErrors, refuseUnlikeRecords } from "./refusals.js";

/** One rival of a comparison. Sums run over the groups, each with its own constants and sigma. */
export interface ComparisonRow {
  readonly rule: string;
  /** n: residuals of all groups. */
  readonly count: number;
  readonly unknowns: number;
  readonly sumOfSquares: number;
  /** On the scale that the comparison states. */
  readonly logLikelihood: number;
  readonly aicCorrected: number;
  /** AICc above the lowest. */
  readonly difference: number;
  /** Akaike weight: exp(-difference/2), the rivals' weights adding up to 1. */
  readonly weight: number;
  /** True where a constant of the rule is not determined by the record. */
  readonly undetermined: boolean;
}

/** Rivals set side by side on one record. */
export interface Comparison {
  readonly kind: "comparison";
  /** By increasing AICc. */
  readonly rows: readonly ComparisonRow[];
  readonly verdict: { readonly kind: "supported" | "undecided"; readonly rules: readonly string[] };
  readonly sentence: string;
  readonly notes: readonly string[];
}

/** Differences of AICc within which rivals are not told apart. */
const undecidedWithin = 2;

/**
 * Sets fits of rival rules to one record side by side by AICc, and says which is supported or that they cannot be
 * told apart (AICc within 2 of the lowest).
 *
 * With groups the AICc of the groups are added, each group having its own constants and sigma. Where the
 * spreads differ, fits on the log scale are brought to the record's own scale by the Jacobian, -sum ln(y).
 *
 * @throws {ModelError} `too-few-fits` | `unlike-records` | `unlike-errors`.
 * @see Burnham, K. P. and Anderson, D. R. (2002), Model Selection and Multimodel Inference, sections 2.4, 2.6, 2.9.
 * @example compare([crowdingFit, shelteredFit]).verdict.kind; // "supported"
 */
export function compare(fits: readonly Fit[]): Comparison {
  const [first] = fits;
  if (!first || fits.length < 2) throw refuseOneFit(fits.length);
  for (const other of fits.slice(1)) refuseUnlike(first, other);
  const scalesDiffer = new Set(fits.map((fit) => fit.options.spread ?? "constant")).size > 1;
  const raw = fits.map((fit) => rowOf(fit, scalesDiffer)).sort((a, b) => a.aicCorrected - b.aicCorrected);
  const lowest = raw[0]!.aicCorrected;
  const total = raw.reduce((sum, row) => sum + Math.exp((lowest - row.aicCorrected) / 2), 0);
  const rows = raw.map((row) => ({
    ...row,
    difference: row.aicCorrected - lowest,
    weight: Math.exp((lowest - row.aicCorrected) / 2) / total,
  }));
  const close = rows.filter((row) => row.difference <= undecidedWithin).map((row) => row.rule);
  const verdict = { kind: close.length > 1 ? "undecided" : "supported", rules: close } as const;
  return Object.freeze({
    kind: "comparison",
    rows: Object.freeze(rows),
    verdict,
    sentence: sentenceOf(verdict.kind, rows),
    notes: Object.freeze(notesOf(fits, scalesDiffer)),
  });
}

function rowOf(fit: Fit, ownScale: boolean): Omit<ComparisonRow, "difference" | "weight"> {
  const sum = (of: (group: Fit["groups"][number]) => number): number =>
    fit.groups.reduce((total, group) => total + of(group), 0);
  const jacobian = ownScale && fit.options.spread === "proportional" ? sum(logOfValues) : 0;
  return {
    rule: fit.rule.text,
    count: sum((group) => group.count),
    unknowns: sum((group) => group.estimates.length),
    sumOfSquares: sum((group) => group.sumOfSquares),
    logLikelihood: sum((group) => group.criteria.logLikelihood) - jacobian,
    aicCorrected: sum((group) => group.criteria.aicCorrected) + 2 * jacobian,
    undetermined: fit.groups.some((group) => group.estimates.some((e) => e.standardError === undefined)),
  };
}

function logOfValues(group: Fit["groups"][number]): number {
  return group.points.reduce((total, point) => total + Math.log(point.observed), 0);
}

function refuseUnlike(first: Fit, other: Fit): void {
  if (first.options.errors !== other.options.errors) throw refuseUnlikeErrors();
  const same =
    first.groups.length === other.groups.length &&
    first.groups.every((group, g) => {
      const twin = other.groups[g]!;
      return (
        group.count === twin.count &&
        group.points.every((point, i) => point.observed === twin.points[i]!.observed)
      );
    });
  if (!same) throw refuseUnlikeRecords(first.rule.text, other.rule.text);
}

function sentenceOf(kind: "supported" | "undecided", rows: readonly ComparisonRow[]): string {
  const [best, next] = rows as [ComparisonRow, ComparisonRow];
  const gap = next.difference.toFixed(1);
  if (kind === "undecided")
    return (
      `Undecided: the record does not tell "${best.rule}" from "${next.rule}" (AICc ${gap} apart; within ` +
      `${undecidedWithin} is no evidence). Carry both forward.`
    );
  return `The record supports "${best.rule}"; the next rival, "${next.rule}", lies ${gap} behind in AICc.`;
}

function notesOf(fits: readonly Fit[], scalesDiffer: boolean): string[] {
  const notes = ["AICc counts sigma and uses RSS/n; lower is better."];
  if (scalesDiffer)
    notes.push("The fits stand on different scales: those on the log scale are brought back by -sum ln(y).");
  if (fits.some((fit) => fit.groups.length > 1))
    notes.push("AICc added over the groups, each with its own constants and sigma.");
  return notes;
}
