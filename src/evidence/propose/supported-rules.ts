import type { Tried } from "./try-rules.js";

/**
 * Lead in AICc that is no evidence among a dozen rules looked at together. For two rivals named beforehand 2 is the
 * custom; among many the best owes part of its lead to chance, and with 4 the rule that made a drawn record stays in
 * nine of ten times (measured; see the benchmark).
 */
export const supportedWithin = 4;
/** Lead over every naive rule below which no rule of change is called for. */
export const aheadOfNaive = 4;
/** Log-likelihood that a further parameter must bring: less is what chance brings (half of AIC's price of 2). */
const worthwhile = 1;

/** What became of a rule that was tried. */
export interface Standing {
  readonly tried: Tried;
  /** AICc above the lowest of its kind of error. */
  readonly difference: number;
  readonly supported: boolean;
  /** Why it is not supported; "" where it is. */
  readonly reason: string;
}

/**
 * Judges the rules tried with one kind of error: supported are those within 4 of the lowest AICc that lie ahead of every
 * naive rule, without those whose further parameters bring no likelihood over a simpler supported one.
 *
 * @see Burnham, K. P. and Anderson, D. R. (2002), Model Selection and Multimodel Inference, section 2.12.3 (a further
 *   parameter that does not raise the likelihood), 6.9.3 (many rules tried).
 */
export function supportedRules(tried: readonly Tried[]): readonly Standing[] {
  const sorted = [...tried].sort((a, b) => a.aicCorrected - b.aicCorrected);
  const lowest = sorted[0]?.aicCorrected ?? 0;
  const close = sorted.filter(
    (each) => each.aicCorrected <= lowest + supportedWithin && failsNaive(each) === undefined,
  );
  return sorted.map((each) => {
    const reason = reasonAgainst(each, lowest, close);
    return { tried: each, difference: each.aicCorrected - lowest, supported: reason === "", reason };
  });
}

function reasonAgainst(each: Tried, lowest: number, close: readonly Tried[]): string {
  const naive = failsNaive(each);
  if (naive !== undefined) return `no better than "${naive}"`;
  if (each.aicCorrected > lowest + supportedWithin)
    return `${(each.aicCorrected - lowest).toFixed(1)} behind in AICc`;
  const simpler = close.find(
    (other) => other.unknowns < each.unknowns && other.logLikelihood > each.logLikelihood - worthwhile,
  );
  return simpler === undefined ? "" : `adds nothing to ${simpler.name}`;
}

/** The naive rule that does as well; undefined where none does. */
function failsNaive({ aicCorrected, naive }: Tried): string | undefined {
  return naive.find((other) => other.aicCorrected < aicCorrected + aheadOfNaive)?.name;
}
