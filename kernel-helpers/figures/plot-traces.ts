import { downsample } from "./downsample.js";
import type { Panel } from "./figure.js";
import type { BandLayer, BarsLayer, Layer, LineLayer } from "./layer.js";
import { type SeriesStyle, seriesStyle, tint } from "./palette.js";
import { plainValues } from "./plain-values.js";
import { plotText } from "./plot-text.js";
import { pointsTrace } from "./points-trace.js";
import { positionLabel } from "./position-labels.js";

/** One trace of the plotting library. */
export type PlotTrace = Readonly<Record<string, unknown>>;

const bandEdges = ["2px,3px", "7px,3px", "solid"];

/** The traces of a panel; thresholds, vertical lines and arrows are part of the layout. */
export function plotTraces(panel: Panel, at: number): PlotTrace[] {
  const axes = { xaxis: axisName("x", at), yaxis: axisName("y", at) };
  return panel.layers.flatMap((layer, turn) => {
    const style = seriesStyle(layer.style ?? turn);
    const trace = layerTrace(layer, style);
    if (trace === undefined) return [];
    const name = plotText(layer.name, 24, 2);
    return [
      { ...trace, ...labelledHover(panel, trace), ...axes, name, showlegend: layer.inLegend !== false },
    ];
  });
}

/** Hover texts with labels of periods instead of positions on the axis. */
function labelledHover({ x }: Panel, trace: PlotTrace): PlotTrace {
  const places = trace["x"];
  if (x.periods === undefined || trace["hoverinfo"] === "skip" || !Array.isArray(places)) return {};
  const text = places.map((place: unknown) =>
    typeof place === "number" ? plotText(positionLabel(x, place), 28) : "",
  );
  return { text, hovertemplate: "%{text}, %{y}" };
}

/** Names of panel axes in the plotting library: "x", "x2", "x3". */
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

function lineTrace(layer: LineLayer, { colour, dash }: SeriesStyle): PlotTrace {
  const kept = downsample(layer.x, layer.y)?.kept;
  const broken = layer.dashed ? "8px,4px" : dash;
  return {
    type: "scatter",
    mode: "lines",
    x: plainValues(layer.x, kept),
    y: plainValues(layer.y, kept),
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
  const kept = downsample(layer.x, layer.upper)?.kept;
  const x = plainValues(layer.x, kept);
  const lower = plainValues(layer.lower, kept);
  const upper = plainValues(layer.upper, kept);
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
    orientation: layer.horizontal ? "h" : "v",
    x: plainValues(layer.x, undefined),
    y: plainValues(layer.y, undefined),
    marker: { color: tint(colour, 0.85), line: { color: colour, width: 1.5 } },
  };
}
