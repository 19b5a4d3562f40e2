import type { RollingOrigin } from "../forecasts/rolling-origin.js";
import type { ComparisonRow } from "./comparison-row.js";

/** Said where no rival stands. */
export function noneAdequate(reason: string): string {
  return `None adequate: ${reason}. Forecast without a rule, or look for what the record leaves out.`;
}

/** Which rival the record supports, or which it does not tell apart. */
export function standingSentence(
  standing: readonly ComparisonRow[],
  rows: readonly ComparisonRow[],
  within: number,
): string {
  const quoted = standing.map(({ rule }) => `"${rule}"`);
  const [best] = standing;
  if (standing.length > 1) {
    const apart = standing[standing.length - 1]!.aicCorrected - best!.aicCorrected;
    const list = `${quoted.slice(0, -1).join(", ")} and ${quoted[quoted.length - 1]}`;
    return `Undecided: the record does not tell ${list} apart (AICc ${apart.toFixed(1)} between them; within ${within} is no evidence). Carry ${standing.length === 2 ? "both" : "all"} forward.`;
  }
  const next = rows.find((row) => row !== best && row.aicCorrected >= best!.aicCorrected);
  if (next === undefined) return `The record supports ${quoted[0]}.`;
  const behind = (next.aicCorrected - best!.aicCorrected).toFixed(1);
  return `The record supports ${quoted[0]}; the next rival, "${next.rule}", lies ${behind} behind in AICc.`;
}

/** Said where a forecast without a rule came closer than every rival that stands. */
export function betterNaive(
  standing: readonly ComparisonRow[],
  rolled: RollingOrigin | undefined,
): readonly string[] {
  if (rolled === undefined) return [];
  const errorOf = (score: RollingOrigin["scores"][number]): number => score.meanAbsoluteError;
  const own = Math.min(...standing.map((row) => errorOf(rolled.scores[row.place]!)));
  const naive = rolled.scores
    .filter(({ kind }) => kind === "naive")
    .reduce((low, next) => (errorOf(next) < errorOf(low) ? next : low));
  if (errorOf(naive) >= own) return [];
  const many = standing.length === 1 ? "it" : "any of them";
  return [
    `Forecast from earlier parts of the record, "${naive.name}" came closer than ${many} (mean absolute error ${errorOf(naive).toPrecision(2)} against ${own.toPrecision(2)}), so little is gained by a rule over so short a horizon.`,
  ];
}
