import { normalCdf, normalDensity } from "../../numeric/index.js";

/**
 * Continuous ranked probability score of a normal forecast: the distance between the forecast distribution and
 * what came, in the unit of the value; lower is better, and a forecast without spread scores its absolute error.
 *
 * @see Gneiting, T. and Raftery, A. E. (2007), Strictly proper scoring rules, prediction, and estimation, Journal of
 *   the American Statistical Association 102, equation 21 (there with the opposite sign).
 */
export function crpsNormal(value: number, mean: number, deviation: number): number {
  if (deviation === 0) return Math.abs(value - mean);
  const z = (value - mean) / deviation;
  return deviation * (z * (2 * normalCdf(z) - 1) + 2 * normalDensity(z) - 1 / Math.sqrt(Math.PI));
}

/**
 * The same score of a lognormal forecast, whose logarithm is normal.
 *
 * @see Baran, S. and Lerch, S. (2015), Log-normal distribution based ensemble model output statistics models,
 *   Quarterly Journal of the Royal Meteorological Society 141, equation 7.
 */
export function crpsLognormal(value: number, meanLog: number, deviationLog: number): number {
  const z = (Math.log(value) - meanLog) / deviationLog;
  const mean = Math.exp(meanLog + deviationLog ** 2 / 2);
  const spread = normalCdf(z - deviationLog) + normalCdf(deviationLog / Math.SQRT2) - 1;
  return value * (2 * normalCdf(z) - 1) - 2 * mean * spread;
}

/**
 * Interval score: the width of the interval, and 2/(1 - level) times the distance by which the value lies outside.
 *
 * @see Gneiting and Raftery (2007), section 6.2, equation 43.
 */
export function intervalScore(value: number, lower: number, upper: number, level: number): number {
  const outside = Math.max(0, lower - value) + Math.max(0, value - upper);
  return upper - lower + (2 / (1 - level)) * outside;
}

/**
 * Mean absolute error of forecasts in units of the mean absolute change over `lag` periods in the record before
 * them: below 1 where they are better than carrying the last value (of a season) on was there.
 *
 * @param errors - observed minus forecast.
 * @param before - the record that the forecasts were made from, in order.
 * @see Hyndman, R. J. and Koehler, A. B. (2006), Another look at measures of forecast accuracy, International Journal
 *   of Forecasting 22.
 */
export function scaledError(errors: readonly number[], before: ArrayLike<number>, lag = 1): number {
  let change = 0;
  for (let t = lag; t < before.length; t++) change += Math.abs(before[t]! - before[t - lag]!);
  const scale = change / (before.length - lag);
  return errors.reduce((sum, error) => sum + Math.abs(error), 0) / errors.length / scale;
}
