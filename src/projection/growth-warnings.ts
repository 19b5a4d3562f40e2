import type { Warning } from "../numeric/index.js";
import type { Rule } from "../rule/index.js";
import type { GatheredState } from "./ensemble/gather.js";

/** Where the mean of the paths grows and a typical path does not, or grows less: which of the two to read. */
export function growthWarnings(rule: Rule, states: readonly GatheredState[], period: string): Warning[] {
  return states.flatMap(({ growth }, s): Warning[] => {
    if (growth === undefined) return [];
    const { rate, error, ofMean } = growth;
    if (!(ofMean - rate > 5 * error && ofMean - rate > 0.1 * Math.abs(rate))) return [];
    const share = (value: number): string => `${(100 * value).toFixed(2)}%`;
    return [
      {
        code: "mean-misleads",
        message:
          `${rule.states[s]} grows by ${share(rate)} a ${period} along a typical path (E ln R, Monte-Carlo error ${share(error)}), ` +
          `and by ${share(ofMean)} in the mean, which few lucky paths carry: read the median.`,
      },
    ];
  });
}
