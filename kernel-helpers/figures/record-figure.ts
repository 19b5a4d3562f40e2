import { plural } from "../wording/index.js";
import { type Axis, type Figure, figure } from "./figure.js";
import type { Layer, PointsLayer } from "./layer.js";
import { positionLabel } from "./position-labels.js";
import { breakAtGaps, type RecordedSeries } from "./recorded-series.js";

/** A recorded value with a finding. */
export interface FlaggedValue {
  readonly x: number | string;
  readonly y: number;
  /** The finding, in a few words. */
  readonly why: string;
}

/** Options of `recordFigure`. */
export interface RecordFigureOptions {
  readonly title: string;
  readonly x: Axis;
  readonly y: Axis;
  /** Series with the same unit. */
  readonly series: readonly RecordedSeries[];
  readonly flagged?: readonly FlaggedValue[];
  readonly notes?: readonly string[];
}

const maxListed = 8;
/** Above this number of values only the line is drawn. */
const maxSeparatePoints = 2000;

/**
 * The record before any model: every value as read, lines interrupted at gaps, flagged values marked.
 *
 * @example recordFigure({ title: "Stock", x: { title: "Week" }, y: { title: "Coils" }, series: [{ name: "counted", x: [0, 1], y: [90, 83] }] });
 */
export function recordFigure({ title, x, y, series, flagged = [], notes = [] }: RecordFigureOptions): Figure {
  const layers = series.flatMap((each, style): Layer[] => {
    const line = { mark: "line", ...breakAtGaps(each), style } as const;
    if (each.x.length > maxSeparatePoints) return [line];
    return [
      { ...line, inLegend: false },
      { mark: "points", ...each, style },
    ];
  });
  const flags: PointsLayer = {
    mark: "points",
    name: "flagged",
    variant: "flag",
    x: flagged.map((flag) => flag.x) as PointsLayer["x"],
    y: flagged.map((flag) => flag.y),
  };
  const reasons = flagged
    .slice(0, maxListed)
    .map((flag) => `Flagged at ${x.periods === undefined ? flag.x : positionLabel(x, flag.x)}: ${flag.why}`);
  if (flagged.length > maxListed)
    reasons.push(`${plural(flagged.length - maxListed, "more flagged value")}.`);
  return figure({
    title,
    x,
    y,
    layers: flagged.length > 0 ? [...layers, flags] : layers,
    notes: [...reasons, ...notes],
  });
}
