import { downsample } from "./downsample.js";
import type { PointsLayer } from "./layer.js";
import type { SeriesStyle } from "./palette.js";
import { plainValues } from "./plain-values.js";
import type { PlotTrace } from "./plot-traces.js";

/** Separate values as a trace, with error bars where they have limits. */
export function pointsTrace(layer: PointsLayer, style: SeriesStyle): PlotTrace {
  const kept = downsample(layer.x, layer.y)?.kept;
  const y = plainValues(layer.y, kept);
  const { lower, upper } = layer;
  const bars =
    lower && upper
      ? { error_y: errorBars(y, plainValues(lower, kept), plainValues(upper, kept), style) }
      : {};
  return {
    type: "scatter",
    mode: "markers",
    x: plainValues(layer.x, kept),
    y,
    marker: { ...markerStyle(layer.variant ?? "plain", style), ...sizeOf(layer) },
    ...bars,
  };
}

/** Dense points are small and have no outline. */
function sizeOf({ large, small, x, variant }: PointsLayer): object {
  if (large) return { size: 13 };
  if (variant === undefined || variant === "plain") {
    if (small || x.length > 600) return { size: 3, line: { width: 0 } };
  }
  return {};
}

function markerStyle(variant: "plain" | "open" | "flag", { colour, symbol }: SeriesStyle): object {
  if (variant === "flag") return { symbol: "diamond-open", size: 15, color: "#b3261e", line: { width: 2 } };
  if (variant === "open") return { symbol: `${symbol}-open`, size: 9, color: colour, line: { width: 2 } };
  return { symbol, size: 7, color: colour, line: { width: 0.75, color: "#fffefb" } };
}

function errorBars(
  y: readonly unknown[],
  lower: readonly unknown[],
  upper: readonly unknown[],
  { colour }: SeriesStyle,
): object {
  const above = (at: number): number => Number(upper[at]) - Number(y[at]);
  const below = (at: number): number => Number(y[at]) - Number(lower[at]);
  return {
    type: "data",
    symmetric: false,
    array: y.map((_, at) => above(at)),
    arrayminus: y.map((_, at) => below(at)),
    color: colour,
    thickness: 1.2,
    width: 3,
  };
}
