import type { Panel } from "./figure.js";
import type { Layer } from "./layer.js";

/**
 * Gives panels of one quantity the same scale, so that groups can be compared by eye. Panels with different vertical
 * axes, or without numbers, are returned unchanged.
 */
export function sharedScale(panels: readonly Panel[]): readonly Panel[] {
  const named = new Set(panels.map(({ y }) => `${y.title} ${y.unit ?? ""} ${y.scale ?? ""}`));
  const heights = panels.flatMap(({ layers }) => layers.flatMap(heightsOf));
  const least = heights.reduce((low, height) => Math.min(low, height), Number.POSITIVE_INFINITY);
  const greatest = heights.reduce((high, height) => Math.max(high, height), Number.NEGATIVE_INFINITY);
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
