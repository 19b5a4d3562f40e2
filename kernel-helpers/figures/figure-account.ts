import type { Axis, Figure, Panel } from "./figure.js";
import type { Layer, Places } from "./layer.js";
import { significant } from "./number-text.js";
import { placeText } from "./period-places.js";
import { axisTitle } from "./plot-text.js";

/** What a figure shows, in sentences: for a reader who does not see it. */
export function figureAccount(figure: Figure): string[] {
  const summary = figure.summary === "" ? [] : [figure.summary];
  return [...summary, ...figure.panels.flatMap(panelAccount)];
}

function panelAccount(panel: Panel): string[] {
  const name = panel.title === "" ? "" : `Panel "${panel.title}". `;
  const axes = `${name}Across: ${axisTitle(panel.x)}; upwards: ${axisTitle(panel.y)}.`;
  const said = panel.layers.filter((layer) => layer.mark !== "label" && layer.inLegend !== false);
  return [axes, ...said.map((layer) => layerAccount(layer, panel.x))];
}

function layerAccount(layer: Layer, across: Axis): string {
  switch (layer.mark) {
    case "points":
      return `${layer.name}: ${layer.x.length} points, ${span(layer.y)}.`;
    case "line":
      return `${layer.name}: a line, ${span(layer.y)}.`;
    case "band":
      return `${layer.name}: a band, at its end from ${at(layer.lower, -1)} to ${at(layer.upper, -1)}.`;
    case "bars":
      return `${layer.name}: ${layer.x.length} bars.`;
    case "threshold":
      return `${layer.name}: level ${significant(layer.y)}.`;
    case "vertical":
      return `${layer.name}: marked at ${placeText(across, layer.x)}.`;
    case "label":
      return layer.name;
    case "arrow":
      return `${layer.name}: an arrow pointing ${layer.towards} at ${significant(layer.x)}.`;
  }
}

function span(values: Places): string {
  let least = Number.POSITIVE_INFINITY;
  let greatest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (typeof value !== "number" || Number.isNaN(value)) continue;
    least = Math.min(least, value);
    greatest = Math.max(greatest, value);
  }
  return least > greatest ? "no numbers" : `from ${significant(least)} to ${significant(greatest)}`;
}

function at(values: ArrayLike<number>, place: number): string {
  const value = values[place < 0 ? values.length + place : place];
  return value === undefined || Number.isNaN(value) ? "no value" : significant(value);
}
