import { unreadableOption } from "../refusals.js";
import {
  type LyapunovExponent,
  type LyapunovExponentOptions,
  lyapunovExponent,
} from "./lyapunov-exponent.js";

export interface PredictionHorizonOptions extends LyapunovExponentOptions {
  /** Uncertainty of the first value, in its unit. */
  readonly error: number;
  /** Largest error of a value that is still of use, in the same unit. */
  readonly tolerance: number;
}

/** How far ahead single values can be foretold. */
export interface PredictionHorizon {
  readonly kind: "prediction-horizon";
  readonly lyapunovExponent: LyapunovExponent;
  /** About log(tolerance/error)/exponent periods; infinite where gaps do not grow. */
  readonly periods: number;
  /** From the ends of the exponent's interval. */
  readonly interval: readonly [number, number];
  readonly sentence: string;
}

/**
 * Tells after how many periods a small uncertainty of the first value has grown to the largest tolerable one.
 *
 * @throws {ModelError} as `exponent`; `unreadable-option`.
 * @example predictionHorizon(recurrence("x[t+1] = 2.5*x*(1 - x)"), { initial: { x: 0.3 }, error: 0.001, tolerance: 0.1 }).periods; // Infinity
 */
export function predictionHorizon(
  rule: LyapunovExponent["rule"],
  options: PredictionHorizonOptions,
): PredictionHorizon {
  const { error, tolerance } = options;
  if (!(error > 0 && Number.isFinite(error))) throw unreadableOption("error", "a number above 0", error);
  if (!(tolerance > error))
    throw unreadableOption("tolerance", `a number above the error ${error}`, tolerance);
  const found = lyapunovExponent(rule, options);
  const periodsAt = (value: number): number =>
    value > 0 ? Math.log(tolerance / error) / value : Number.POSITIVE_INFINITY;
  const periods = periodsAt(found.value);
  const interval = [periodsAt(found.interval[1]), periodsAt(found.interval[0])] as const;
  const sentence = Number.isFinite(periods)
    ? `Single values can be foretold for about ${Math.floor(periods)} periods; beyond, give the long-run range of values and how often a limit is passed.`
    : "Small errors do not grow, so chaos sets no horizon; the parameters' uncertainty and random change still do.";
  return { kind: "prediction-horizon", lyapunovExponent: found, periods, interval, sentence };
}
