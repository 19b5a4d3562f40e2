import type { Fit } from "../../estimate/index.js";
import { isWorse } from "../forecasts/is-worse.js";
import type { RollingOrigin } from "../forecasts/rolling-origin.js";
import type { ComparisonRow } from "./comparison-row.js";
import { naiveCriteria } from "./naive-criteria.js";

/** What a comparison comes to. */
export interface ComparisonVerdict {
  readonly kind: "supported" | "undecided" | "none-adequate";
  /** The rule, or the rules not told apart; empty where none is adequate. */
  readonly rules: readonly string[];
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
): { readonly verdict: ComparisonVerdict; readonly sentence: string } {
  const close = rows.filter((row) => row.difference <= undecidedWithin).map((row) => row.rule);
  const failings = close.map((rule) => failingOf(fits.find((fit) => fit.rule.text === rule)!, rolled));
  const standing = close.filter((_, i) => failings[i] === undefined);
  if (standing.length === 0) {
    const sentence = `None adequate: ${failings[0]}. Forecast without a rule, or look for what the record leaves out.`;
    return { verdict: { kind: "none-adequate", rules: [] }, sentence };
  }
  const kind = standing.length > 1 ? "undecided" : "supported";
  return { verdict: { kind, rules: standing }, sentence: sentenceOf(standing, rows) };
}

/** Why a rule is not adequate; undefined where it is. */
function failingOf(fit: Fit, rolled: RollingOrigin | undefined): string | undefined {
  const { own, naive } = naiveCriteria(fit);
  const best = naive.reduce((low, next) => (next.aicCorrected < low.aicCorrected ? next : low));
  if (best.aicCorrected <= own)
    return `"${best.name}" explains the record as well as "${fit.rule.text}" and needs fewer constants`;
  const scores = rolled?.scores.find(({ name, kind }) => kind === "rule" && name === fit.rule.text);
  const worse = rolled?.scores.find(
    (other) => other.kind === "naive" && scores !== undefined && isWorse(scores.each, other.each, clearly),
  );
  if (worse === undefined) return undefined;
  return `forecasts of "${fit.rule.text}" from earlier parts of the record did clearly worse than "${worse.name}"`;
}

function sentenceOf(standing: readonly string[], rows: readonly ComparisonRow[]): string {
  const quoted = standing.map((rule) => `"${rule}"`);
  const [best] = standing;
  if (standing.length > 1) {
    const last = rows.filter((row) => standing.includes(row.rule)).pop()!;
    const list = `${quoted.slice(0, -1).join(", ")} and ${quoted[quoted.length - 1]}`;
    return `Undecided: the record does not tell ${list} apart (AICc ${last.difference.toFixed(1)} between them; within ${undecidedWithin} is no evidence). Carry ${standing.length === 2 ? "both" : "all"} forward.`;
  }
  const own = rows.find((row) => row.rule === best)!;
  const next = rows.find((row) => row.rule !== best && row.aicCorrected >= own.aicCorrected);
  if (next === undefined) return `The record supports "${best}".`;
  return `The record supports "${best}"; the next rival, "${next.rule}", lies ${(next.aicCorrected - own.aicCorrected).toFixed(1)} behind in AICc.`;
}
