import { type Fit, problemOf } from "../../estimate/index.js";
import { type RunHooks, ticker } from "../../numeric/index.js";
import { type RollingOrigin, rollingOrigin } from "../forecasts/rolling-origin.js";
import { refuseExact } from "../refit/refuse-exact.js";
import {
  refuseOneFit,
  refuseUnlikeErrors,
  refuseUnlikeFilters,
  refuseUnlikeRecords,
  refuseUnlikeStarts,
} from "../refusals.js";
import { type ComparisonRow, comparisonRows } from "./comparison-row.js";
import { type ComparisonVerdict, comparisonVerdict } from "./comparison-verdict.js";
import { fitLabels } from "./fit-labels.js";
import { type LikelihoodRatio, likelihoodRatios } from "./likelihood-ratio.js";

/** Options of `compare`. */
export interface CompareOptions extends RunHooks {
  /** Rows from which each rival is fitted afresh and carried forward; default a third of the record, 12 at most. */
  readonly origins?: number;
  /** Periods forecast from each; default a tenth of the record. */
  readonly periods?: number;
  /** Confidence level of the forecasts' intervals, between 0 and 1; default 0.8. */
  readonly level?: number;
  /** What the client would be told by a fit; where rivals are not told apart, what each says is set side by side. */
  readonly decide?: (fit: Fit) => string;
}

/** What one rival leads to. */
export interface RivalDecision {
  /** What the comparison calls the rival. */
  readonly rule: string;
  readonly decision: string;
}

/** Rivals set side by side on one record. */
export interface Comparison {
  readonly kind: "comparison";
  /** By increasing AICc. */
  readonly rows: readonly ComparisonRow[];
  readonly likelihoodRatios: readonly LikelihoodRatio[];
  /** Undefined where the record is too short to be forecast from its own parts. */
  readonly rollingOrigin: RollingOrigin | undefined;
  readonly verdict: ComparisonVerdict;
  /** What each rule that stands leads to, where `decide` was given. */
  readonly decisions: readonly RivalDecision[];
  readonly sentence: string;
  readonly notes: readonly string[];
}

/**
 * Sets fits of rival rules to one record side by side: AICc and weights, likelihood ratios of those nested in each
 * other, and forecasts from earlier parts of the record against naive ones. Says which is supported, that they cannot be
 * told apart (AICc within 2), or that none is adequate.
 *
 * A fit has one AICc, however many groups: separate ones, each with its own parameters and sigma, add theirs up. Where the
 * scales differ, fits on the log scale are brought to the record's own scale by the Jacobian, -sum ln(y). With `decide`, what
 * every rule that stands leads to is told, and none is called best.
 *
 * @throws {ModelError} `too-few-fits` | `unlike-records` | `unlike-errors` | `unlike-starts` |
 *   `exact-fit`.
 * @see Burnham, K. P. and Anderson, D. R. (2002), Model Selection and Multimodel Inference, sections 2.4, 2.6, 2.9.
 * @example compare([crowdingFit, shelteredFit]).verdict.kind; // "supported"
 */
export function compare(fits: readonly Fit[], options: CompareOptions = {}): Comparison {
  const [first] = fits;
  if (!first || fits.length < 2) throw refuseOneFit(fits.length);
  for (const other of fits.slice(1)) refuseUnlike(first, other);
  for (const fit of fits) refuseExact(fit);
  const scalesDiffer = new Set(fits.map((fit) => problemOf(fit).scale.log)).size > 1;
  const labels = fitLabels(fits);
  const rows = comparisonRows(fits, labels, scalesDiffer);
  const rolled = rollingOrigin(fits, planOf(first, options));
  const { verdict, standing, sentence } = comparisonVerdict(fits, rows, rolled);
  const decisions = decisionsOf(fits, standing, options.decide);
  return {
    kind: "comparison",
    rows,
    likelihoodRatios: likelihoodRatios(fits, labels),
    rollingOrigin: rolled,
    verdict,
    decisions,
    sentence: [sentence, ...decisionText(verdict, decisions)].join(" "),
    notes: notesOf(fits, scalesDiffer, rolled),
  };
}

function planOf(
  fit: Fit,
  { origins, periods: horizon, level = 0.8, ...hooks }: CompareOptions,
): Parameters<typeof rollingOrigin>[1] {
  const rows = Math.min(...fit.observations.groups.map((group) => group.index.length));
  const count = origins ?? Math.min(12, Math.round(rows / 3));
  return {
    leftOut: Array.from({ length: count }, (_, i) => count - i),
    horizon: horizon ?? Math.max(1, Math.round(rows / 10)),
    level,
    tick: ticker(hooks, fit.groups.length * count),
  };
}

function refuseUnlike(first: Fit, other: Fit): void {
  if (problemOf(first).errors !== problemOf(other).errors) throw refuseUnlikeErrors();
  const lags = first.rule.lags.length - other.rule.lags.length;
  if (
    problemOf(first).errors === "process" &&
    lags !== 0 &&
    first.groups[0]!.count !== other.groups[0]!.count
  )
    throw refuseUnlikeStarts(first.groups[0]!.count, other.groups[0]!.count);
  refuseUnlikeBeginnings(first, other);
  const same =
    first.groups.length === other.groups.length &&
    first.groups.every((group, g) => {
      const twin = other.groups[g]!;
      return (
        group.count === twin.count &&
        group.points.every((point, i) => point.observed === twin.points[i]!.observed)
      );
    });
  if (!same) {
    const [one, two] = fitLabels([first, other]);
    throw refuseUnlikeRecords(one!, two!);
  }
}

/** A filter that begins in the long run explains the first reading, one that begins at it does not. */
function refuseUnlikeBeginnings(first: Fit, other: Fit): void {
  for (const group of first.groups) {
    const twin = other.groups.find((each) => each.group === group.group);
    const starts = [group.filter?.start, twin?.filter?.start];
    const isLongRun = starts.map((start) => start === "stationary");
    if (twin === undefined || starts.includes(undefined) || isLongRun[0] === isLongRun[1]) continue;
    const [one, two] = fitLabels([first, other]);
    throw refuseUnlikeFilters([one!, two!], [group.count, twin.count], first.rule.states);
  }
}

function decisionsOf(
  fits: readonly Fit[],
  standing: readonly ComparisonRow[],
  decide: CompareOptions["decide"],
): RivalDecision[] {
  if (decide === undefined) return [];
  return standing.map(({ rule, place }) => ({ rule, decision: decide(fits[place]!) }));
}

function decisionText({ kind }: ComparisonVerdict, decisions: readonly RivalDecision[]): string[] {
  if (kind !== "undecided" || decisions.length === 0) return [];
  const [one] = decisions;
  if (decisions.every(({ decision }) => decision === one!.decision))
    return [`Every one of them leads to the same decision: ${one!.decision}`];
  const each = decisions.map(({ rule, decision }) => `By "${rule}": ${decision}`);
  return ["They lead to different decisions, and no rule is called best.", ...each];
}

function notesOf(fits: readonly Fit[], scalesDiffer: boolean, rolled: RollingOrigin | undefined): string[] {
  const problems = fits.map(problemOf);
  const squares = problems.some(({ kind }) => kind === "least-squares");
  const notes = [
    `AICc counts every unknown${squares ? ", sigma too, and uses RSS/n" : ""}; lower is better.`,
  ];
  if (scalesDiffer)
    notes.push("The fits stand on different scales: those on the log scale are brought back by -sum ln(y).");
  const several = fits.some((fit) => fit.groups.length > 1);
  if (several && problems.some(({ groups }) => groups === "separate"))
    notes.push("Groups fitted separately, each with its own parameters and sigma: their AICc add up.");
  if (problems.some(({ groups }) => groups !== "separate"))
    notes.push("Groups fitted together: one AICc for all of them.");
  if (rolled === undefined)
    notes.push(
      "The record is too short to be forecast from its own earlier parts, or the fits are not of least squares.",
    );
  return notes;
}
