import { type CheckedSeries, noteValue, periodOf } from "./checked-series.js";

const repeats = 3;
/** Counts of few different values repeat their highest by chance. */
const differentValues = 5;

/** The highest (or lowest) value of a series repeated in a row: a limit of the instrument rather than a value. */
export function ceiling(series: CheckedSeries): void {
  const { values, group } = series;
  const told = group.censoring?.[series.state.name];
  const long = runs(values).filter(({ from }) => !told?.[from]);
  if (long.length === 0 || new Set(values).size < differentValues) return;
  const [most, least] = [values.reduce((a, b) => Math.max(a, b)), values.reduce((a, b) => Math.min(a, b))];
  for (const { from, count } of long) {
    const value = values[from]!;
    const times = `is repeated ${count} times`;
    if (value === most)
      noteValue(
        series,
        from,
        "ceiling",
        `Reader ceiling suspected: ${value} ${times}; right-censored from ${periodOf(series, from)}.`,
      );
    else if (value === least && value > 0)
      noteValue(
        series,
        from,
        "floor",
        `Detection limit suspected: the lowest value ${value} ${times} from ${periodOf(series, from)}; left-censored there.`,
      );
  }
}

/** Where a value is repeated in a row often enough, and how often. */
function runs(values: Float64Array): readonly { readonly from: number; readonly count: number }[] {
  const found: { from: number; count: number }[] = [];
  let from = 0;
  for (let i = 1; i <= values.length; i++) {
    if (i < values.length && values[i] === values[from]) continue;
    if (i - from >= repeats) found.push({ from, count: i - from });
    from = i;
  }
  return found;
}
