import type { Panel } from "./figure.js";

/** Whether all of these places may be years, which are written without a sign between thousands: 1000 to 2999. */
export function yearLike(places: readonly unknown[]): boolean {
  const inRange = (place: unknown): boolean => typeof place === "number" && place >= 1000 && place < 3000;
  return places.length > 0 && places.every(inRange);
}

/** Whether the horizontal axis of a panel may count years. */
export function acrossYears(panel: Panel): boolean {
  const places = panel.layers.flatMap((layer) =>
    "x" in layer && typeof layer.x === "object" && layer.x.length > 0 ? [Array.from<unknown>(layer.x)] : [],
  );
  return places.length > 0 && places.every(yearLike);
}
