import { type CheckedSeries, noteValue, periodOf } from "./checked-series.js";

/** Tukey (1977), Exploratory Data Analysis, section 2D: beyond three times the distance between the hinges is "far out". */
const farOut = 3;

/** A flow far beyond the others: a bulk order, a campaign, or a doubled entry. */
export function bulk(series: CheckedSeries): void {
  const { values, measured } = series;
  if (measured !== "flow" || values.length < 8) return;
  const sorted = Float64Array.from(values).sort();
  const [lower, upper] = [at(sorted, 0.25), at(sorted, 0.75)];
  const fence = upper + farOut * (upper - lower);
  if (upper === lower) return;
  values.forEach((value, i) => {
    if (value > fence)
      noteValue(
        series,
        i,
        "bulk",
        `${periodOf(series, i)}: ${value} is far above the rest (half lie between ${lower} and ${upper}); a single large order or a doubled entry? Exclude it only with a decision.`,
      );
  });
}

/** Quantile by definition 7 of Hyndman and Fan. */
function at(sorted: Float64Array, share: number): number {
  const place = share * (sorted.length - 1);
  const below = Math.floor(place);
  return (
    sorted[below]! + (place - below) * (sorted[Math.min(below + 1, sorted.length - 1)]! - sorted[below]!)
  );
}
