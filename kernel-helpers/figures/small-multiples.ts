import { type Axis, type Figure, figure, type Panel } from "./figure.js";
import { type Ends, framedMultiples } from "./framed-multiples.js";
import { type LineSeries, type RecordedSeries, recordedStyle } from "./recorded-series.js";

/** One series of small multiples, with its fitted line. */
export interface SmallSeries {
  readonly name: string;
  readonly recorded: RecordedSeries;
  readonly fitted?: LineSeries;
}

/** Options of `smallMultiples`. */
export interface SmallMultiplesOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly SmallSeries[];
  readonly notes?: readonly string[];
}

/** Up to this number, series have axes of their own; more are drawn as frames on one pair of axes. */
const maxOwnAxes = 12;

/**
 * Small multiples: many series side by side on the same scale. More than twelve are drawn as frames in a grid, each with
 * its name; a note gives the common scale.
 */
export function smallMultiples(options: SmallMultiplesOptions): Figure {
  const { title, x, y, series, notes = [] } = options;
  const ends = { x: reach(series, "x"), y: reach(series, "y") };
  if (series.length > maxOwnAxes) return framedMultiples(options, ends);
  const panels = series.map(
    (each): Panel => ({
      title: each.name,
      x: { ...x, ends: padded(ends.x) },
      y: { ...y, ends: padded(ends.y) },
      layers: [
        ...(each.fitted ? [{ mark: "line", ...each.fitted, name: "fitted", style: 0 } as const] : []),
        { mark: "points", ...each.recorded, name: "recorded", style: recordedStyle },
      ],
    }),
  );
  return figure({ title, panels, notes });
}

function reach(series: readonly SmallSeries[], axis: "x" | "y"): Ends {
  let least = Number.POSITIVE_INFINITY;
  let greatest = Number.NEGATIVE_INFINITY;
  for (const { recorded, fitted } of series) {
    for (const values of [recorded[axis], fitted?.[axis] ?? []]) {
      for (let i = 0; i < values.length; i++) {
        const value = Number(values[i]);
        if (Number.isNaN(value)) continue;
        least = Math.min(least, value);
        greatest = Math.max(greatest, value);
      }
    }
  }
  return [least, greatest > least ? greatest : least + 1];
}

function padded([least, greatest]: Ends): Ends {
  const room = 0.06 * (greatest - least);
  return [least - room, greatest + room];
}
