import type { FitRows } from "./fit-rows.js";
import type { Readings } from "./readings.js";

/** The one-step predictions of a filter, from reading number `skipped` on, as the values that a fit compares. */
export function predictionRows(
  readings: Readings,
  size: number,
  skipped: number,
  log: boolean,
  run: (at: Float64Array, predicted: Float64Array) => number,
): FitRows {
  const predicted = new Float64Array(readings.count);
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
    prepare(at) {
      run(at, predicted);
    },
    residualAt(i) {
      const mean = predicted[i + skipped]!;
      fitted = log ? Math.exp(mean) : mean;
      return readings.roots[i + skipped]! * (readings.values[i + skipped]! - mean);
    },
    fitted: () => fitted,
  };
}
