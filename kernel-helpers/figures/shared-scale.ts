import type { Panel } from "./figure.js";
import type { Layer } from "./layer.js";

/**
 * Panels of one quantity with one scale, so that groups can be compared by eye. Panels whose upright axes measure
 * different things, or on which nothing is a number, stay as they are.
 */
export function sharedScale(panels: readonly Panel[]): readonly Panel[] {
  const named = new Set(panels.map(({ y }) => `${y.title} ${y.unit ?? ""} ${y.scale ?? ""}`));
  const heights = panels.flatMap(({ layers }) => layers.flatMap(heightsOf));
  const least = heights.reduce((few, height) => Math.min(few, height), Number.POSITIVE_INFINITY);
  const greatest = heights.reduce((most, height) => Math.max(most, height), Number.NEGATIVE_INFINITY);
  if (panels.length < 2 || named.size > 1 || !(greatest > least)) return panels;
  const room = 0.05 * (greatest - least);
  return panels.map((panel) => ({ ...panel, y: { ...panel.y, ends: [least - room, greatest + room] } }));
}

function heightsOf(layer: Layer): number[] {
  const drawn = layer.mark === "band" ? [layer.lower, layer.upper] : "y" in layer ? [layer.y] : [];
  return drawn
    .flatMap((values): unknown[] => (typeof values === "number" ? [values] : Array.from<unknown>(values)))
    .filter((value): value is number => typeof value === "number" && Number.isFinite(value));
}
