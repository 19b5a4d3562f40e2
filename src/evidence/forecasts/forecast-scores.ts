import { normalQuantile } from "../../numeric/index.js";
import { crpsLognormal, crpsNormal, intervalScore, scaledError } from "../statistics/scores.js";
import type { Prediction } from "./predict-ahead.js";

/** A prediction on the fitting scale, with what came and the record before it, in the record's own unit. */
export interface Scored extends Prediction {
  readonly value: number;
  readonly before: Float64Array;
}

/** How one forecaster did. All but the shares are in the unit of the value. */
export interface ForecastScores {
  readonly name: string;
  readonly kind: "rule" | "naive";
  /** Of medians. */
  readonly meanAbsoluteError: number;
  readonly rootMeanSquareError: number;
  /** Absolute error in units of the mean absolute change of the record before. */
  readonly scaledError: number;
  /** Share of values inside the prediction interval. */
  readonly coverage: number;
  readonly intervalScore: number;
  /** Mean continuous ranked probability score: lower is better. */
  readonly crps: number;
  /** The score of every forecast, in order, for comparing forecasters pair by pair. */
  readonly each: readonly number[];
}

/** Scores forecasts; `log` tells that their logarithm is normal. */
export function scoresOf(
  name: string,
  kind: ForecastScores["kind"],
  scored: readonly Scored[],
  log: boolean,
  level: number,
): ForecastScores {
  const z = normalQuantile((1 + level) / 2);
  const own = (value: number): number => (log ? Math.exp(value) : value);
  const count = scored.length;
  const mean = (of: (forecast: Scored) => number): number =>
    scored.reduce((sum, forecast) => sum + of(forecast), 0) / count;
  const error = ({ value, mean: middle }: Scored): number => value - own(middle);
  const ends = ({ mean: middle, deviation }: Scored): [number, number] => [
    own(middle - z * deviation),
    own(middle + z * deviation),
  ];
  const each = scored.map(({ value, mean: middle, deviation }) =>
    log ? crpsLognormal(value, middle, deviation) : crpsNormal(value, middle, deviation),
  );
  return {
    name,
    kind,
    meanAbsoluteError: mean((forecast) => Math.abs(error(forecast))),
    rootMeanSquareError: Math.sqrt(mean((forecast) => error(forecast) ** 2)),
    scaledError: mean((forecast) => scaledError([error(forecast)], forecast.before)),
    coverage: mean((forecast) => {
      const [lower, upper] = ends(forecast);
      return forecast.value >= lower && forecast.value <= upper ? 1 : 0;
    }),
    intervalScore: mean((forecast) => intervalScore(forecast.value, ...ends(forecast), level)),
    crps: each.reduce((sum, score) => sum + score, 0) / count,
    each,
  };
}
