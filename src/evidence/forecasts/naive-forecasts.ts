import type { ObservedGroup } from "../../record/index.js";
import type { Prediction } from "./predict-ahead.js";

/** A forecast that anyone could make without a rule. */
export interface NaiveForecast {
  readonly name: "no change" | "last multiplier" | "last change" | "mean level";
  /** Prediction of the value `ahead` periods after row `last`, on the fitting scale; undefined where it needs more rows. */
  readonly predict: (
    group: ObservedGroup,
    state: string,
    last: number,
    ahead: number,
  ) => Prediction | undefined;
}

/**
 * The naive forecasts on a scale: no change; the last multiplier (on the log scale; otherwise the last change) going
 * on; and the mean level. Their errors are those that they would have made in the record so far.
 */
export function naiveForecasts(log: boolean): readonly NaiveForecast[] {
  const series = (group: ObservedGroup, state: string, last: number): number[] =>
    Array.from(group.values[state]!.subarray(0, last + 1), (value) => (log ? Math.log(value) : value));
  return [
    {
      name: "no change",
      predict(group, state, last, ahead) {
        const values = series(group, state, last);
        const deviation = rootMeanSquare(stepsOf(values, group));
        return usable(values[last]!, deviation * Math.sqrt(ahead));
      },
    },
    {
      name: log ? "last multiplier" : "last change",
      predict(group, state, last, ahead) {
        const values = series(group, state, last);
        const steps = stepsOf(values, group);
        const deviation = rootMeanSquare(steps.slice(1).map((step, i) => step - steps[i]!));
        // Errors of the step itself add up: 1 + 4 + ... + ahead^2.
        const grown = Math.sqrt((ahead * (ahead + 1) * (2 * ahead + 1)) / 6);
        return usable(values[last]! + ahead * steps[steps.length - 1]!, deviation * grown);
      },
    },
    {
      name: "mean level",
      predict(group, state, last) {
        const values = series(group, state, last);
        const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
        const deviation = rootMeanSquare(values.map((value) => value - mean));
        return usable(mean, deviation * Math.sqrt((values.length + 1) / (values.length - 1)));
      },
    },
  ];
}

/** Changes from row to row, a period. */
function stepsOf(values: readonly number[], group: ObservedGroup): number[] {
  return values.slice(1).map((value, i) => (value - values[i]!) / (group.index[i + 1]! - group.index[i]!));
}

function rootMeanSquare(values: readonly number[]): number {
  return Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length);
}

function usable(mean: number, deviation: number): Prediction | undefined {
  return Number.isFinite(mean) && deviation > 0 ? { mean, deviation } : undefined;
}
