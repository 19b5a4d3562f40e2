import { type Axis, type Figure, figure, type Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { type LineSeries, type RecordedSeries, recordedStyle, ruleStyle } from "./recorded-series.js";
import { sharedScale } from "./shared-scale.js";

/** One series with fitted curves. */
export interface FittedSeries {
  /** "" for a single series. */
  readonly name: string;
  /** Horizontal axis of this series, if it differs from the figure's. */
  readonly x?: Axis;
  readonly observed: RecordedSeries;
  /** Replicate readings of the observed values, drawn hollow. */
  readonly replicates?: RecordedSeries;
  readonly fitted: readonly LineSeries[];
}

/** Options of `fittedFigure`. */
export interface FittedFigureOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly FittedSeries[];
  readonly notes?: readonly string[];
}

/** Observed and fitted values, one panel per series; rival rules differ in dash and colour. */
export function fittedFigure({ title, x, y, series, notes = [] }: FittedFigureOptions): Figure {
  const panels = series.map(
    (each): Panel => ({ title: each.name, x: each.x ?? x, y, layers: seriesLayers(each) }),
  );
  return figure({ title, panels: sharedScale(panels), notes });
}

function seriesLayers({ observed, replicates, fitted }: FittedSeries): Layer[] {
  return [
    ...fitted.map((line, turn): Layer => ({ mark: "line", ...line, style: ruleStyle(turn) })),
    ...(replicates
      ? [{ mark: "points", ...replicates, variant: "open", style: recordedStyle } as const]
      : []),
    { mark: "points", ...observed, style: recordedStyle },
  ];
}
