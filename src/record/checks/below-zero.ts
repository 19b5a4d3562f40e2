import { type CheckedSeries, inSeries, noteSeries, noteValue, periodOf } from "./checked-series.js";

/** With a larger share of negative values than this the quantity takes both signs, and single ones are no news. */
const bothSigns = 0.2;

/** Negative levels and flows, and levels of zero, which have no logarithm and no per-head change. */
export function belowZero(series: CheckedSeries): void {
  const { values, state, measured } = series;
  let negative = 0;
  let zero = 0;
  for (let i = 0; i < values.length; i++) {
    if (values[i]! < 0) negative++;
    else if (values[i] === 0) zero++;
  }
  if (negative > bothSigns * values.length && values.length > 4) {
    const message = `${negative} of ${values.length} values of ${state.column}${inSeries(series)} are below zero: rules of growth need a scale without negative values.`;
    noteSeries(series, "both-signs", String(negative), message);
  } else if (negative > 0 || (zero > 0 && measured === "level")) noteEach(series);
}

function noteEach(series: CheckedSeries): void {
  const { measured } = series;
  series.values.forEach((value, i) => {
    if (value < 0)
      noteValue(series, i, measured === "level" ? "negative-level" : "negative-flow", below(series, i));
    if (value === 0 && measured === "level") noteValue(series, i, "zero-level", zeroLevel(series, i));
  });
}

function below(series: CheckedSeries, i: number): string {
  const { state, values, measured } = series;
  const why =
    measured === "level"
      ? "a receipt is missing or late, or a sign is turned"
      : "a return, or a sign is turned";
  return `${periodOf(series, i)}: ${state.column} ${values[i]}; ${why}.`;
}

function zeroLevel(series: CheckedSeries, i: number): string {
  return `Row ${series.group.rows[i]}: level 0 has no logarithm; choose censored, count model, or exclude.`;
}
