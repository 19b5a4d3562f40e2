import { plural } from "../wording/index.js";
import type { Axis, Figure, Panel } from "./figure.js";
import type { Layer, Places } from "./layer.js";
import { significant } from "./number-text.js";
import { axisTitle } from "./plot-text.js";
import { positionLabel } from "./position-labels.js";

/** Text alternative of a figure: what it shows, in sentences. */
export function describeFigure(figure: Figure): string[] {
  const summary = figure.summary === "" ? [] : [figure.summary];
  return [...summary, ...figure.panels.flatMap(describePanel)];
}

function describePanel(panel: Panel): string[] {
  const name = panel.title === "" ? "" : `Panel "${panel.title}". `;
  const axes = `${name}Horizontal axis: ${axisTitle(panel.x)}; vertical axis: ${axisTitle(panel.y)}.`;
  const described = panel.layers.filter((layer) => layer.mark !== "label" && layer.inLegend !== false);
  return [axes, ...described.map((layer) => describeLayer(layer, panel.x))];
}

function describeLayer(layer: Layer, across: Axis): string {
  switch (layer.mark) {
    case "points":
      return `${layer.name}: ${plural(layer.x.length, "point")}, ${range(layer.y)}.`;
    case "line":
      return `${layer.name}: line, ${range(layer.y)}.`;
    case "band":
      return `${layer.name}: band, from ${at(layer.lower, -1)} to ${at(layer.upper, -1)} at its end.`;
    case "bars":
      return `${layer.name}: ${plural(layer.x.length, "bar")}.`;
    case "threshold":
      return `${layer.name}: threshold at ${significant(layer.y)}.`;
    case "vertical":
      return `${layer.name}: vertical line at ${positionLabel(across, layer.x)}.`;
    case "label":
      return layer.name;
    case "arrow":
      return `${layer.name}: arrow pointing ${layer.direction} at ${significant(layer.x)}.`;
  }
}

function range(values: Places): string {
  let least = Number.POSITIVE_INFINITY;
  let greatest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (typeof value !== "number" || Number.isNaN(value)) continue;
    least = Math.min(least, value);
    greatest = Math.max(greatest, value);
  }
  return least > greatest ? "no values" : `from ${significant(least)} to ${significant(greatest)}`;
}

function at(values: ArrayLike<number>, place: number): string {
  const value = values[place < 0 ? values.length + place : place];
  return value === undefined || Number.isNaN(value) ? "no value" : significant(value);
}
