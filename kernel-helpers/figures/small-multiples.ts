import { type Axis, type Figure, figure, type Panel } from "./figure.js";
import { type Ends, framedMultiples } from "./framed-multiples.js";
import { type DrawnLine, type RecordedSeries, recordedStyle } from "./recorded-series.js";

/** One small picture: a series, and what a rule makes of it. */
export interface SmallSeries {
  readonly name: string;
  readonly recorded: RecordedSeries;
  readonly fitted?: DrawnLine;
}

/** What `smallMultiples` draws. */
export interface SmallMultiplesOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly SmallSeries[];
  readonly notes?: readonly string[];
}

/** Up to so many series have axes of their own; more are drawn as frames on one pair of axes. */
const ownAxes = 12;

/**
 * Many series side by side on the same scale. Beyond twelve they are frames in a grid, each with its name; the scale
 * that all share is said below.
 */
export function smallMultiples(options: SmallMultiplesOptions): Figure {
  const { title, x, y, series, notes = [] } = options;
  const ends = { x: reach(series, "x"), y: reach(series, "y") };
  if (series.length > ownAxes) return framedMultiples(options, ends);
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
