import { type Fit, problemOf } from "../../estimate/index.js";
import { chiSquareUpperTail } from "../../numeric/index.js";
import { nestingOf } from "./nesting.js";

/** Whether parameters that a smaller rule leaves out are worth having. */
export interface LikelihoodRatio {
  readonly smaller: string;
  readonly larger: string;
  /** Parameters of the larger rule, and the value at which it becomes the smaller. */
  readonly at: Readonly<Record<string, number>>;
  /** Twice the difference of log-likelihoods. */
  readonly statistic: number;
  readonly degreesOfFreedom: number;
  /** Undefined where the conditions of the chi-square distribution do not hold. */
  readonly probability: number | undefined;
  readonly sentence: string;
}

/**
 * Likelihood-ratio tests of every pair of fits of which one is a special case of the other.
 *
 * No probability is given where the value at which the larger rule becomes the smaller lies on the edge of its admitted
 * range, since the statistic is not chi-square distributed there.
 *
 * @see Wilks, S. S. (1938), Annals of Mathematical Statistics 9; on the edge Self, S. G. and Liang, K.-Y. (1987),
 *   Journal of the American Statistical Association 82.
 */
export function likelihoodRatios(
  fits: readonly Fit[],
  labels: readonly string[],
): readonly LikelihoodRatio[] {
  return fits.flatMap((smaller, s) =>
    fits.flatMap((larger, l) => {
      if (smaller === larger) return [];
      const nesting = isCommonOf(smaller, larger)
        ? { at: {} }
        : areLike(smaller, larger) && nestingOf(smaller, larger);
      return nesting ? [ratioOf(smaller, larger, [labels[s]!, labels[l]!], nesting.at)] : [];
    }),
  );
}

/** Whether two fits take groups and errors alike, so that only their rules differ. */
function areLike(one: Fit, other: Fit): boolean {
  const [a, b] = [problemOf(one), problemOf(other)];
  return a.distribution === b.distribution && a.groups === b.groups;
}

/** Whether one fit has the same parameters for all groups, and the other the same rule with each group's own. */
function isCommonOf(one: Fit, other: Fit): boolean {
  const [a, b] = [problemOf(one), problemOf(other)];
  const sameRule = one.rule.text === other.rule.text && a.distribution === b.distribution;
  return sameRule && a.groups === "combined" && b.groups === "separate";
}

function ratioOf(
  smaller: Fit,
  larger: Fit,
  names: readonly [string, string],
  at: Readonly<Record<string, number>>,
): LikelihoodRatio {
  const statistic = Math.max(0, 2 * (larger.criteria.logLikelihood - smaller.criteria.logLikelihood));
  const degreesOfFreedom = larger.criteria.counted - smaller.criteria.counted;
  const { bounds } = problemOf(larger);
  const edge = Object.keys(at).filter((name) => bounds(name).includes(at[name]!));
  const probability = edge.length > 0 ? undefined : chiSquareUpperTail(statistic, degreesOfFreedom);
  const base = {
    smaller: names[0],
    larger: names[1],
    at,
    statistic,
    degreesOfFreedom,
    probability,
  };
  return { ...base, sentence: sentenceOf(base, edge) };
}

function sentenceOf(ratio: Omit<LikelihoodRatio, "sentence">, edge: readonly string[]): string {
  const where = Object.entries(ratio.at)
    .map(([name, value]) => `${name} = ${value}`)
    .join(", ");
  const nested = `"${ratio.smaller}" is "${ratio.larger}" ${where === "" ? "with the same parameters and sigma for all groups" : `at ${where}`}`;
  const numbers = `likelihood ratio ${ratio.statistic.toFixed(2)} on ${ratio.degreesOfFreedom}`;
  if (ratio.probability === undefined)
    return `${nested} (${numbers}); that lies on the edge of the range of ${edge.join(", ")}, so the chi-square distribution does not hold and no probability is given.`;
  const p = ratio.probability < 0.001 ? "p below 0.001" : `p ${ratio.probability.toFixed(3)}`;
  return ratio.probability < 0.05
    ? `${nested}; the record asks for more (${numbers}, ${p}).`
    : `${nested}; the record does not ask for more (${numbers}, ${p}).`;
}
