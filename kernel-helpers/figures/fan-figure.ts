import { percent } from "../wording/index.js";
import { type Axis, type Figure, figure, type Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { type DrawnLine, type RecordedSeries, recordedStyle } from "./recorded-series.js";
import { sharedScale } from "./shared-scale.js";

/** A band of a projection. */
export interface DrawnBand {
  /** Share of futures inside it: 0.8. */
  readonly level: number;
  /** Which of the three kinds it is: "future observation", "mean path", "parameter". */
  readonly of: string;
  readonly x: ArrayLike<number>;
  readonly lower: ArrayLike<number>;
  readonly upper: ArrayLike<number>;
}

/** A projection of one series. */
export interface ProjectedSeries {
  /** "" when there is a single series. */
  readonly name: string;
  /** Its own horizontal axis, where that of the figure does not hold. */
  readonly x?: Axis;
  readonly recorded: RecordedSeries;
  readonly central: DrawnLine;
  readonly bands: readonly DrawnBand[];
  readonly recordEnd: number;
  /** Where single paths cease to mean anything; undefined when that is not reached. */
  readonly horizon?: number;
}

/** What `fanFigure` draws. */
export interface FanFigureOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly ProjectedSeries[];
  /** The level that decides, with its meaning: "draw-down at 120". */
  readonly threshold?: { readonly value: number; readonly name: string };
  /** Sentence on the probability of the event the client cares about. */
  readonly event?: string;
  readonly notes?: readonly string[];
}

/** Record and projection on one axis: nested bands named by level and kind, the record's end, and what decides. */
export function fanFigure({ title, x, y, series, threshold, event, notes = [] }: FanFigureOptions): Figure {
  const panels = series.map(
    (each): Panel => ({
      title: each.name,
      x: each.x ?? x,
      y,
      layers: [
        ...fanLayers(each),
        ...(threshold
          ? [{ mark: "threshold", name: threshold.name, y: threshold.value, style: 3 } as const]
          : []),
      ],
    }),
  );
  return figure({
    title,
    panels: sharedScale(panels),
    notes: [...(event ? [event] : []), ...notes],
    summary: event ?? "",
  });
}

function fanLayers({ recorded, central, bands, recordEnd, horizon }: ProjectedSeries): Layer[] {
  const nested = [...bands].sort((a, b) => b.level - a.level);
  return [
    ...nested.map(({ level, of, x, lower, upper }, turn): Layer => {
      return { mark: "band", name: `${percent(level)} ${of}`, x, lower, upper, nested: turn, style: 0 };
    }),
    { mark: "line", ...central, style: 0 },
    { mark: "points", ...recorded, style: recordedStyle },
    { mark: "vertical", name: "record ends", x: recordEnd, style: 4 },
    ...(horizon === undefined ? [] : [{ mark: "vertical", name: "horizon", x: horizon, style: 5 } as const]),
  ];
}
