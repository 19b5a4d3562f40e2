import { theme } from "../tables/index.js";
import type { Panel } from "./figure.js";
import type { ArrowLayer, Layer, ThresholdLayer, VerticalLayer } from "./layer.js";
import { seriesStyle } from "./palette.js";
import type { PanelPosition } from "./panel-layout.js";
import { plotText } from "./plot-text.js";
import { axisName } from "./plot-traces.js";

/** The marks of a panel: lines behind the data, labels and arrows above it. */
export interface Marks {
  readonly shapes: readonly object[];
  readonly annotations: readonly object[];
}

/** Thresholds, vertical lines, labels and arrows of a panel. */
export function panelMarks(panel: Panel, at: number, place: PanelPosition): Marks {
  const room = Math.max(14, Math.min(34, Math.floor(place.columns * 0.6)));
  // On a narrow screen many labels would overlap; the data table has them.
  const crowded = place.columns < 50 && panel.layers.filter(({ mark }) => mark === "label").length > 12;
  let upright = 0;
  const marks = panel.layers.map((layer, turn): Marks => {
    const { colour } = seriesStyle(layer.style ?? turn);
    if (layer.mark === "threshold") return threshold(layer, at, colour, room);
    if (layer.mark === "vertical") return vertical(layer, at, colour, upright++, room);
    if (layer.mark === "label" && !crowded) {
      const where = { xref: axisName("x", at), yref: axisName("y", at), x: layer.x, y: layer.y };
      return {
        shapes: [],
        annotations: [
          label(layer, 14, {
            ...where,
            xanchor: "left",
            yanchor: "top",
            font: { size: 9, color: theme.text },
          }),
        ],
      };
    }
    if (layer.mark === "arrow") return { shapes: [], annotations: arrow(layer, at, colour, room) };
    return { shapes: [], annotations: [] };
  });
  return {
    shapes: marks.flatMap((mark) => mark.shapes),
    annotations: marks.flatMap((mark) => mark.annotations),
  };
}

function threshold(layer: ThresholdLayer, at: number, colour: string, room: number): Marks {
  const xref = `${axisName("x", at)} domain`;
  const yref = axisName("y", at);
  const line = { color: colour, width: 1.6, dash: "10px,4px" };
  return {
    shapes: [{ type: "line", layer: "below", xref, yref, x0: 0, x1: 1, y0: layer.y, y1: layer.y, line }],
    annotations:
      layer.inLegend === false
        ? []
        : [
            label(layer, room, {
              xref,
              yref,
              x: 0,
              y: layer.y,
              xanchor: "left",
              yanchor: "bottom",
              xshift: 3,
            }),
          ],
  };
}

/** Labels of vertical lines are at different heights, so that close ones do not overlap. */
function vertical(layer: VerticalLayer, at: number, colour: string, turn: number, room: number): Marks {
  const xref = axisName("x", at);
  const yref = `${axisName("y", at)} domain`;
  const line = { color: colour, width: 1.4, dash: "4px,4px" };
  const y = 1 - 0.075 * (turn % 4);
  return {
    shapes: [{ type: "line", layer: "below", xref, yref, x0: layer.x, x1: layer.x, y0: 0, y1: 1, line }],
    annotations:
      layer.inLegend === false
        ? []
        : [label(layer, room, { xref, yref, x: layer.x, y, xanchor: "left", yanchor: "top" })],
  };
}

function label(layer: Layer, room: number, where: object): object {
  return {
    text: plotText(layer.name, room, 2),
    showarrow: false,
    font: { size: 12, color: theme.text },
    ...where,
    bgcolor: "rgba(255,254,251,0.82)",
    borderpad: 1,
    align: "left",
  };
}

/** Arrow and label separately: drawn as one, the label would cover a short arrow. */
function arrow(layer: ArrowLayer, at: number, colour: string, room: number): object[] {
  const [ax, ay] = tails[layer.direction];
  const where = { xref: axisName("x", at), yref: axisName("y", at), x: layer.x, y: layer.y };
  const head = {
    ...where,
    ax,
    ay,
    showarrow: true,
    arrowhead: 2,
    arrowsize: 1.2,
    arrowwidth: 2.2,
    arrowcolor: colour,
  };
  if (layer.inLegend === false) return [head];
  const xanchor = layer.direction === "left" ? "left" : "right";
  return [
    head,
    label(layer, room, { ...where, xanchor, yanchor: "top", yshift: layer.direction === "up" ? -38 : -5 }),
  ];
}

/** Pixels from an arrow's head to its tail. */
const tails = { left: [36, 0], right: [-36, 0], up: [0, 36], down: [0, -36] } as const;
