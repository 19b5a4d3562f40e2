import { type CheckedSeries, middle, noteValue, periodOf } from "./checked-series.js";

/** Packs and cases, and shifted decimal points. */
const factors = [6, 10, 12, 24, 100, 1000];
const within = 0.08;

/** A change by the size of a pack or a power of ten, far beyond the usual one: a change of unit. */
export function unitJump(series: CheckedSeries): void {
  const { values } = series;
  if (values.length < 4 || values.some((value) => !(value > 0))) return;
  const logs = Array.from(values, Math.log);
  const changes = logs.slice(1).map((log, i) => log - logs[i]!);
  const usual = middle(changes.map(Math.abs));
  changes.forEach((change, i) => {
    const factor = factors.find((size) => Math.abs(Math.abs(change) - Math.log(size)) < Math.log(1 + within));
    if (factor === undefined || Math.abs(change) < 5 * usual) return;
    const direction = change > 0 ? "times" : "divided by";
    noteValue(
      series,
      i + 1,
      "unit-jump",
      `${periodOf(series, i + 1)}: ${values[i + 1]} is about ${values[i]} ${direction} ${factor}; a change of unit or pack, or a shifted decimal point? Give the factor, or correct the rows.`,
    );
  });
}
