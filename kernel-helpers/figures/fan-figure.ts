import { percent } from "../wording/index.js";
import { type Axis, type Figure, figure, type Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { type LineSeries, type RecordedSeries, recordedStyle } from "./recorded-series.js";
import { sharedScale } from "./shared-scale.js";

/** A band of a forecast. */
export interface ForecastBand {
  /** Coverage of the band: 0.8. */
  readonly level: number;
  /** What the band covers: "future observation", "mean path", "parameter". */
  readonly of: string;
  readonly x: ArrayLike<number>;
  readonly lower: ArrayLike<number>;
  readonly upper: ArrayLike<number>;
}

/** The forecast of one series. */
export interface ProjectedSeries {
  /** "" for a single series. */
  readonly name: string;
  /** Horizontal axis of this series, if it differs from the figure's. */
  readonly x?: Axis;
  readonly recorded: RecordedSeries;
  readonly central: LineSeries;
  readonly bands: readonly ForecastBand[];
  readonly recordEnd: number;
  /** Prediction horizon, beyond which single trajectories cannot be predicted; undefined when it is not reached. */
  readonly predictionHorizon?: number;
}

/** Options of `fanFigure`. */
export interface FanFigureOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly ProjectedSeries[];
  /** The decisive level with its meaning: "draw-down at 120". */
  readonly threshold?: { readonly value: number; readonly name: string };
  /** Sentence about the probability of the event in question. */
  readonly event?: string;
  readonly notes?: readonly string[];
}

/** Fan chart: record and forecast on one axis, with nested bands, the end of the record and the decisive level. */
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

function fanLayers({ recorded, central, bands, recordEnd, predictionHorizon }: ProjectedSeries): Layer[] {
  const nested = [...bands].sort((a, b) => b.level - a.level);
  return [
    ...nested.map(({ level, of, x, lower, upper }, turn): Layer => {
      return { mark: "band", name: `${percent(level)} ${of}`, x, lower, upper, nested: turn, style: 0 };
    }),
    { mark: "line", ...central, style: 0 },
    { mark: "points", ...recorded, style: recordedStyle },
    { mark: "vertical", name: "end of record", x: recordEnd, style: 4 },
    ...(predictionHorizon === undefined
      ? []
      : [{ mark: "vertical", name: "prediction horizon", x: predictionHorizon, style: 5 } as const]),
  ];
}
