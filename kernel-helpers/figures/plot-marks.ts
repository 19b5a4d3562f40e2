import { look } from "../tables/index.js";
import type { Panel } from "./figure.js";
import type { ArrowLayer, Layer, ThresholdLayer, VerticalLayer } from "./layer.js";
import { seriesStyle } from "./palette.js";
import type { PanelPlace } from "./panel-places.js";
import { plotText } from "./plot-text.js";
import { axisName } from "./plot-traces.js";

/** What a panel's marks become: lines behind the data, and words or arrows above it. */
export interface Marks {
  readonly shapes: readonly object[];
  readonly annotations: readonly object[];
}

/** Thresholds, upright marks and arrows of a panel. */
export function panelMarks(panel: Panel, at: number, place: PanelPlace): Marks {
  const room = Math.max(14, Math.min(34, Math.floor(place.columns * 0.6)));
  // On a narrow screen many names would run into each other; the table behind the figure has them.
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
          label(layer, 14, { ...where, xanchor: "left", yanchor: "top", font: { size: 9, color: look.ink } }),
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

/** Labels of several marks stand at different heights, so that near ones do not cover each other. */
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
    font: { size: 12, color: look.ink },
    ...where,
    bgcolor: "rgba(255,254,251,0.82)",
    borderpad: 1,
    align: "left",
  };
}

/** The arrow and its words apart: drawn as one, the words would cover a short arrow. */
function arrow(layer: ArrowLayer, at: number, colour: string, room: number): object[] {
  const [ax, ay] = tails[layer.towards];
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
  const xanchor = layer.towards === "left" ? "left" : "right";
  return [
    head,
    label(layer, room, { ...where, xanchor, yanchor: "top", yshift: layer.towards === "up" ? -38 : -5 }),
  ];
}

/** Pixels from an arrow's head to its tail. */
const tails = { left: [36, 0], right: [-36, 0], up: [0, 36], down: [0, -36] } as const;
