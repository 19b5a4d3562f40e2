import { type Axis, type Figure, figure, type Panel } from "./figure.js";
import type { Layer } from "./layer.js";
import { type DrawnLine, type RecordedSeries, recordedStyle, ruleStyle } from "./recorded-series.js";
import { sharedScale } from "./shared-scale.js";

/** One series with what rules make of it. */
export interface FittedSeries {
  /** "" when the record has a single series. */
  readonly name: string;
  /** Its own horizontal axis, where that of the figure does not hold. */
  readonly x?: Axis;
  readonly observed: RecordedSeries;
  /** Single readings behind the observed values, drawn hollow. */
  readonly replicates?: RecordedSeries;
  readonly fitted: readonly DrawnLine[];
}

/** What `fittedFigure` draws. */
export interface FittedFigureOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  readonly series: readonly FittedSeries[];
  readonly notes?: readonly string[];
}

/** Observed values against fitted paths, a panel a series; rivals are lines of different dash and colour. */
export function fittedFigure({ title, x, y, series, notes = [] }: FittedFigureOptions): Figure {
  const panels = series.map(
    (each): Panel => ({ title: each.name, x: each.x ?? x, y, layers: seriesLayers(each) }),
  );
  return figure({ title, panels: sharedScale(panels), notes });
}

function seriesLayers({ observed, replicates, fitted }: FittedSeries): Layer[] {
  return [
    ...fitted.map((line, turn): Layer => ({ mark: "line", ...line, style: ruleStyle(turn) })),
    ...(replicates ? [{ mark: "points", ...replicates, look: "open", style: recordedStyle } as const] : []),
    { mark: "points", ...observed, style: recordedStyle },
  ];
}
