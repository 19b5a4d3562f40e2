import { chiSquareUpperTail, type Warning } from "../../numeric/index.js";

/** Whether counts scatter more than the Poisson distribution that was fitted to them allows. */
export interface Overdispersion {
  /** Pearson's chi-square: sum (observed - fitted)^2 / fitted. */
  readonly statistic: number;
  readonly degreesOfFreedom: number;
  /** Statistic over degrees of freedom: the variance of the counts in units of their mean; 1 for Poisson counts. */
  readonly ratio: number;
  /** Of a ratio as large in Poisson counts. */
  readonly probability: number;
}

/**
 * Pearson's statistic of a Poisson fit. With small means it scatters more than chi-square: its variance is
 * sum (2 + 1/mean), and the probability is that of the multiple of a chi-square variable with this mean and variance.
 *
 * @param pearson - residuals in standard deviations; NaN of censored values, which are left out.
 * @see McCullagh, P. and Nelder, J. A. (1989), Generalized Linear Models, 2nd ed., section 4.5 for the ratio; the first two
 *   moments of (Y - m)^2/m are those of the Poisson distribution: 1 and 2 + 1/m.
 */
export function overdispersionOf(
  pearson: Float64Array,
  means: Float64Array,
  free: number,
): Overdispersion | undefined {
  const used = Array.from(pearson, (_, i) => i).filter((i) => Number.isFinite(pearson[i]!));
  const degreesOfFreedom = used.length - free;
  if (degreesOfFreedom < 1) return undefined;
  const statistic = used.reduce((sum, i) => sum + pearson[i]! ** 2, 0);
  const variance = (used.reduce((sum, i) => sum + 2 + 1 / means[i]!, 0) * degreesOfFreedom) / used.length;
  const multiple = variance / (2 * degreesOfFreedom);
  const probability = chiSquareUpperTail(statistic / multiple, degreesOfFreedom / multiple);
  return { statistic, degreesOfFreedom, ratio: statistic / degreesOfFreedom, probability };
}

/** Probability below which the scatter is named: a caution that stands in one of a hundred right fits. */
const clear = 0.01;

/** Said where the intervals of a Poisson fit are too narrow. */
export function overdispersionWarnings(found: Overdispersion | undefined): Warning[] {
  if (found === undefined || !(found.probability < clear)) return [];
  const { ratio, probability } = found;
  const p = probability < 0.001 ? "p below 0.001" : `p ${probability.toFixed(3)}`;
  return [
    {
      code: "overdispersed",
      message:
        `The counts scatter ${ratio.toPrecision(3)} times as much as a Poisson distribution allows (Pearson chi-square/df, ${p}), ` +
        `so standard errors and intervals are about ${Math.sqrt(ratio).toPrecision(2)} times too narrow. Write ` +
        '`distribution: "negative-binomial"`.',
    },
  ];
}
