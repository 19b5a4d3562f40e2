import type { Panel } from "./figure.js";

/** Whether all values could be years (1000 to 2999), which are written without thousands separators. */
export function areYears(places: readonly unknown[]): boolean {
  const inRange = (place: unknown): boolean => typeof place === "number" && place >= 1000 && place < 3000;
  return places.length > 0 && places.every(inRange);
}

/** Whether the horizontal axis of a panel shows years. */
export function hasYearAxis(panel: Panel): boolean {
  const places = panel.layers.flatMap((layer) =>
    "x" in layer && typeof layer.x === "object" && layer.x.length > 0 ? [Array.from<unknown>(layer.x)] : [],
  );
  return places.length > 0 && places.every(areYears);
}
