import type { Predictions } from "../rows/prediction-rows.js";
import type { Readings } from "../rows/readings.js";

/** A rule of one state that is linear on the fitting scale, u' = intercept + slope u, with its errors' variances. */
export interface LinearRule {
  readonly intercept: number;
  readonly slope: number;
  readonly processVariance: number;
  readonly readingVariance: number;
}

/** A normal distribution of a single state, moved in place. */
export interface ScalarEstimate {
  mean: number;
  variance: number;
}

/** The long run of a stable rule; undefined where |slope| is not below 1. */
export function longRun({ intercept, slope, processVariance }: LinearRule): ScalarEstimate | undefined {
  if (!(Math.abs(slope) < 1)) return undefined;
  return { mean: intercept / (1 - slope), variance: processVariance / (1 - slope * slope) };
}

/**
 * Log-likelihood of the readings from number `from` on, by the exact Kalman filter in plain numbers, the estimate
 * standing at the period where the readings begin.
 *
 * @param told - receives the one-step predictions and their standard deviations, where given.
 */
export function linearFilter(
  rule: LinearRule,
  readings: Readings,
  from: number,
  estimate: ScalarEstimate,
  told: Predictions | undefined,
): number {
  const { intercept, slope, processVariance } = rule;
  const { periods, values, roots, count } = readings;
  let { mean, variance } = estimate;
  let period = readings.first;
  let sum = 0;
  for (let i = from; i < count; i++) {
    for (; period < periods[i]!; period++) {
      mean = intercept + slope * mean;
      variance = slope * slope * variance + processVariance;
    }
    const spread = variance + rule.readingVariance / (roots[i]! * roots[i]!);
    if (told !== undefined) {
      told.mean[i] = mean;
      told.deviation[i] = Math.sqrt(spread);
    }
    const innovation = values[i]! - mean;
    const gain = variance / spread;
    mean += gain * innovation;
    variance -= gain * variance;
    sum -= Math.log(spread) + (innovation * innovation) / spread;
  }
  estimate.mean = mean;
  estimate.variance = variance;
  return 0.5 * (sum - (count - from) * Math.log(2 * Math.PI));
}
