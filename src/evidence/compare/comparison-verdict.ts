import type { Fit } from "../../estimate/index.js";
import { isWorse } from "../forecasts/is-worse.js";
import type { RollingOrigin } from "../forecasts/rolling-origin.js";
import type { ComparisonRow } from "./comparison-row.js";
import { betterNaive, noneAdequate, standingSentence } from "./comparison-words.js";
import { naiveCriteria } from "./naive-criteria.js";

/** What a comparison comes to. */
export interface ComparisonVerdict {
  readonly kind: "supported" | "undecided" | "none-adequate";
  /** The rule, or the rules not told apart, as the comparison calls them; empty where none is adequate. */
  readonly rules: readonly string[];
}

/** A verdict with the rivals that stand and the words for it. */
export interface Judgement {
  readonly verdict: ComparisonVerdict;
  readonly standing: readonly ComparisonRow[];
  readonly sentence: string;
}

/** Differences of AICc within which rivals are not told apart. */
export const undecidedWithin = 2;
/** Standard errors by which a naive forecast must be ahead before it speaks against a rule. */
const clearly = 2;

/** Judges rivals: adequate ones within 2 of the lowest AICc stand; none does that is no better than a naive rule. */
export function comparisonVerdict(
  fits: readonly Fit[],
  rows: readonly ComparisonRow[],
  rolled: RollingOrigin | undefined,
): Judgement {
  const close = rows.filter((row) => row.difference <= undecidedWithin);
  const failings = close.map((row) => failingOf(fits[row.place]!, row, rolled));
  const standing = close.filter((_, i) => failings[i] === undefined);
  if (standing.length === 0)
    return { verdict: { kind: "none-adequate", rules: [] }, standing, sentence: noneAdequate(failings[0]!) };
  const kind = standing.length > 1 ? "undecided" : "supported";
  const sentence = [standingSentence(standing, rows, undecidedWithin), ...betterNaive(standing, rolled)].join(
    " ",
  );
  return { verdict: { kind, rules: standing.map((row) => row.rule) }, standing, sentence };
}

/** Why a rule is not adequate; undefined where it is. */
function failingOf(fit: Fit, row: ComparisonRow, rolled: RollingOrigin | undefined): string | undefined {
  const { own, naive } = naiveCriteria(fit);
  const best = naive.reduce((low, next) => (next.aicCorrected < low.aicCorrected ? next : low));
  // A rule that is the naive one, as "x[t+1] = m" is the mean level, is no worse than it.
  const ahead = own.aicCorrected - best.aicCorrected;
  if (ahead > 1e-6 || (ahead > -1e-6 && best.counted < own.counted))
    return `"${best.name}" explains the record as well as "${row.rule}" and needs fewer parameters`;
  const scores = rolled?.scores[row.place];
  const worse = rolled?.scores.find(
    (other) => other.kind === "naive" && scores !== undefined && isWorse(scores.each, other.each, clearly),
  );
  if (worse === undefined) return undefined;
  return `forecasts of "${row.rule}" from earlier parts of the record did clearly worse than "${worse.name}"`;
}
