import type { FitRows } from "./fit-rows.js";
import type { Readings } from "./readings.js";

/** One-step predictions of a filter, one entry a reading, on the fitting scale. */
export interface Predictions {
  readonly mean: Float64Array;
  readonly deviation: Float64Array;
}

/** The one-step predictions of a filter, from reading number `skipped` on, as the values that a fit compares. */
export function predictionRows(
  readings: Readings,
  size: number,
  skipped: number,
  predicted: Predictions,
  from: (scaled: number) => number,
  run: (at: Float64Array) => void,
): FitRows {
  let fitted = 0;
  return {
    size,
    count: readings.count - skipped,
    // A filter has no rows of derivatives: leverage is not defined for it.
    row: new Float64Array(size).fill(Number.NaN),
    entries: readings.entries.subarray(skipped),
    states: readings.states.subarray(skipped),
    observed: readings.observed.subarray(skipped),
    roots: readings.roots.subarray(skipped),
    take: readings.take,
    prepare: run,
    residualAt(i) {
      const mean = predicted.mean[i + skipped]!;
      fitted = from(mean);
      return readings.roots[i + skipped]! * (readings.values[i + skipped]! - mean);
    },
    fitted: () => fitted,
  };
}
