import { type CheckedSeries, inSeries, noteSeries } from "./checked-series.js";

/** From this share on, demand is called sporadic here. (Common practice, no source.) */
const sporadic = 1 / 3;

/** A flow with many zeros: whether a zero is no demand or a closed period cannot be told from it. */
export function manyZeros(series: CheckedSeries): void {
  const { values, state, measured } = series;
  if (measured !== "flow" || values.length < 6) return;
  const zeros = values.filter((value) => value === 0).length;
  if (zeros < sporadic * values.length || zeros === values.length) return;
  const mean = values.reduce((a, b) => a + b, 0) / values.length;
  const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
  const message =
    `${zeros} of ${values.length} values of ${state.column}${inSeries(series)} are zero (variance over mean ${Number((variance / mean).toPrecision(3))}): ` +
    "formulas for a normal spread do not hold; and a zero because of a closed period is not zero demand.";
  noteSeries(series, "many-zeros", String(zeros), message);
}
