import type { Panel } from "./figure.js";
import type { BandLayer, BarsLayer, Layer, LineLayer, Places, PointsLayer } from "./layer.js";
import { type SeriesStyle, seriesStyle, tint } from "./palette.js";
import { plotText } from "./plot-text.js";
import { thinned } from "./thinned.js";

/** One trace of the plotting library, as data. */
export type PlotTrace = Readonly<Record<string, unknown>>;

const bandEdges = ["2px,3px", "7px,3px", "solid"];

/** The traces of a panel; thresholds, vertical marks and arrows belong to the layout. */
export function plotTraces(panel: Panel, at: number): PlotTrace[] {
  const axes = { xaxis: axisName("x", at), yaxis: axisName("y", at) };
  return panel.layers.flatMap((layer, turn) => {
    const style = seriesStyle(layer.style ?? turn);
    const trace = layerTrace(layer, style);
    if (trace === undefined) return [];
    return [{ ...trace, ...axes, name: plotText(layer.name, 24, 2), showlegend: layer.inLegend !== false }];
  });
}

/** "x", "x2", "x3": what the plotting library calls the axes of a panel. */
export function axisName(letter: "x" | "y", at: number): string {
  return at === 0 ? letter : `${letter}${at + 1}`;
}

function layerTrace(layer: Layer, style: SeriesStyle): PlotTrace | undefined {
  switch (layer.mark) {
    case "points":
      return pointsTrace(layer, style);
    case "line":
      return lineTrace(layer, style);
    case "band":
      return bandTrace(layer, style);
    case "bars":
      return barsTrace(layer, style);
    case "threshold":
    case "vertical":
    case "arrow":
    case "label":
      return undefined;
  }
}

function pointsTrace(layer: PointsLayer, style: SeriesStyle): PlotTrace {
  const kept = thinned(layer.x, layer.y)?.kept;
  const y = picked(layer.y, kept);
  const { lower, upper } = layer;
  const bars =
    lower && upper ? { error_y: errorBars(y, picked(lower, kept), picked(upper, kept), style) } : {};
  return {
    type: "scatter",
    mode: "markers",
    x: picked(layer.x, kept),
    y,
    marker: { ...pointLook(layer.look ?? "plain", style), ...sizeOf(layer) },
    ...bars,
  };
}

/** Crowded points are small and without the light rim that sets single ones off. */
function sizeOf({ large, small, x, look }: PointsLayer): object {
  if (large) return { size: 13 };
  if (look === undefined || look === "plain") {
    if (small || x.length > 600) return { size: 3, line: { width: 0 } };
  }
  return {};
}

function pointLook(look: "plain" | "open" | "flag", { colour, symbol }: SeriesStyle): object {
  if (look === "flag") return { symbol: "diamond-open", size: 15, color: "#b3261e", line: { width: 2 } };
  if (look === "open") return { symbol: `${symbol}-open`, size: 9, color: colour, line: { width: 2 } };
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

function lineTrace(layer: LineLayer, { colour, dash }: SeriesStyle): PlotTrace {
  const kept = thinned(layer.x, layer.y)?.kept;
  const broken = layer.dashed ? "8px,4px" : dash;
  return {
    type: "scatter",
    mode: "lines",
    x: picked(layer.x, kept),
    y: picked(layer.y, kept),
    line: {
      color: colour,
      width: layer.thin ? 0.8 : 2.2,
      dash: layer.thin ? "solid" : broken,
      ...(layer.stepped ? { shape: "hv" } : {}),
    },
    connectgaps: false,
  };
}

/** One closed outline: along the lower edge and back along the upper. */
function bandTrace(layer: BandLayer, { colour }: SeriesStyle): PlotTrace {
  const kept = thinned(layer.x, layer.upper)?.kept;
  const x = picked(layer.x, kept);
  const lower = picked(layer.lower, kept);
  const upper = picked(layer.upper, kept);
  const whole = x.map((_, at) => at).filter((at) => lower[at] !== null && upper[at] !== null);
  const back = [...whole].reverse();
  return {
    type: "scatter",
    mode: "lines",
    x: [...whole, ...back].map((at) => x[at]),
    y: [...whole.map((at) => lower[at]), ...back.map((at) => upper[at])],
    fill: "toself",
    fillcolor: tint(colour, 0.15),
    line: { color: tint(colour, 0.75), width: 1, dash: bandEdges[layer.nested ?? 0] ?? "solid" },
    hoverinfo: "skip",
  };
}

function barsTrace(layer: BarsLayer, { colour }: SeriesStyle): PlotTrace {
  return {
    type: "bar",
    orientation: layer.lying ? "h" : "v",
    x: picked(layer.x, undefined),
    y: picked(layer.y, undefined),
    marker: { color: tint(colour, 0.85), line: { color: colour, width: 1.5 } },
  };
}

/** Values as plain data: names escaped, numbers to seven digits (a screen shows four), null where there is none. */
function picked(values: Places, kept: readonly number[] | undefined): (number | string | null)[] {
  const places = kept ?? Array.from({ length: values.length }, (_, i) => i);
  return places.map((place) => {
    const value = values[place];
    if (typeof value === "string") return plotText(value, 28);
    return Number.isFinite(value) ? Number((value as number).toPrecision(7)) : null;
  });
}
