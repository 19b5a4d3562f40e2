import { type CheckedSeries, middle, noteValue, periodOf } from "./checked-series.js";

/** Times the usual distance from the middle of the two neighbours (median absolute deviation, made comparable to a standard deviation by 1.4826). */
const unusual = 8;

/** A level far from both of its neighbours. It is told, never smoothed away. */
export function spike(series: CheckedSeries): void {
  const { values, measured } = series;
  if (measured !== "level" || values.length < 7) return;
  const positive = values.every((value) => value > 0);
  const scaled = positive ? values.map(Math.log) : values;
  const off = Array.from(scaled, (value, i) =>
    i === 0 || i === scaled.length - 1 ? 0 : value - (scaled[i - 1]! + scaled[i + 1]!) / 2,
  );
  const inner = off.slice(1, -1);
  const centre = middle(inner);
  const usual = 1.4826 * middle(inner.map((distance) => Math.abs(distance - centre)));
  for (let i = 1; i < scaled.length - 1; i++) {
    const distance = Math.abs(off[i]! - centre);
    // A spike makes its neighbours look off by half of it: only the largest of the three is meant.
    const isPeak = distance > Math.abs(off[i - 1]! - centre) && distance >= Math.abs(off[i + 1]! - centre);
    if (usual > 0 && distance > unusual * usual && isPeak)
      noteValue(
        series,
        i,
        "spike",
        `${periodOf(series, i)}: ${values[i]} lies far from its neighbours ${values[i - 1]} and ${values[i + 1]}.`,
      );
  }
}
