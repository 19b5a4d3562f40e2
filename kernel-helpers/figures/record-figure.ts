import { type Axis, type Figure, figure } from "./figure.js";
import type { Layer, PointsLayer } from "./layer.js";
import { placeText } from "./period-places.js";
import { brokenAtGaps, type RecordedSeries } from "./recorded-series.js";

/** A recorded value that something was found about. */
export interface FlaggedValue {
  readonly x: number | string;
  readonly y: number;
  /** What was found, in a few words. */
  readonly why: string;
}

/** What `recordFigure` draws. */
export interface RecordFigureOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  /** Series with the same unit; two records on one plot are two of them. */
  readonly series: readonly RecordedSeries[];
  readonly flagged?: readonly FlaggedValue[];
  readonly notes?: readonly string[];
}

const listed = 8;
/** So many values have no room to be seen apart: then the line alone is drawn. */
const crowd = 2000;

/**
 * The record before any model: every value as it was read, lines broken at gaps, flagged values ringed.
 *
 * @example recordFigure({ title: "Stock", x: { title: "Week" }, y: { title: "Coils" }, series: [{ name: "counted", x: [0, 1], y: [90, 83] }] });
 */
export function recordFigure({ title, x, y, series, flagged = [], notes = [] }: RecordFigureOptions): Figure {
  const layers = series.flatMap((each, style): Layer[] => {
    const line = { mark: "line", ...brokenAtGaps(each), style } as const;
    if (each.x.length > crowd) return [line];
    return [
      { ...line, inLegend: false },
      { mark: "points", ...each, style },
    ];
  });
  const flags: PointsLayer = {
    mark: "points",
    name: "flagged",
    look: "flag",
    x: flagged.map((flag) => flag.x) as PointsLayer["x"],
    y: flagged.map((flag) => flag.y),
  };
  const reasons = flagged
    .slice(0, listed)
    .map((flag) => `Flagged at ${x.periods === undefined ? flag.x : placeText(x, flag.x)}: ${flag.why}`);
  if (flagged.length > listed) reasons.push(`${flagged.length - listed} more values are flagged.`);
  return figure({
    title,
    x,
    y,
    layers: flagged.length > 0 ? [...layers, flags] : layers,
    notes: [...reasons, ...notes],
  });
}
