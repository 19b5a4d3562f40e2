import { type CheckedSeries, noteValue, periodOf } from "./checked-series.js";

const repeats = 3;
/** Counts of few different values repeat their highest by chance. */
const differentValues = 5;

/** The highest (or lowest) value of a series repeated in a row: a limit of the instrument rather than a value. */
export function ceiling(series: CheckedSeries): void {
  const { values, group } = series;
  if (new Set(values).size < differentValues) return;
  const told = group.censoring?.[series.state.name];
  const [most, least] = [values.reduce((a, b) => Math.max(a, b)), values.reduce((a, b) => Math.min(a, b))];
  for (const { from, count } of runs(values)) {
    const value = values[from];
    if (count < repeats || (value !== most && value !== least) || told?.[from]) continue;
    if (value === most)
      noteValue(
        series,
        from,
        "ceiling",
        `Reader ceiling suspected: ${value} is repeated ${count} times; right-censored from ${periodOf(series, from)}.`,
      );
    else if (value! > 0)
      noteValue(
        series,
        from,
        "floor",
        `Detection limit suspected: the lowest value ${value} is repeated ${count} times from ${periodOf(series, from)}; left-censored there.`,
      );
  }
}

function* runs(values: Float64Array): Generator<{ readonly from: number; readonly count: number }> {
  let from = 0;
  for (let i = 1; i <= values.length; i++) {
    if (i < values.length && values[i] === values[from]) continue;
    yield { from, count: i - from };
    from = i;
  }
}
