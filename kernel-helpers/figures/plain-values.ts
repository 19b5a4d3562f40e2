import type { Places } from "./layer.js";
import { plotText } from "./plot-text.js";

/** Values as JSON data: names escaped, numbers to seven digits (a screen shows four), null where missing. */
export function plainValues(values: Places, kept: readonly number[] | undefined): (number | string | null)[] {
  const places = kept ?? Array.from({ length: values.length }, (_, i) => i);
  return places.map((place) => {
    const value = values[place];
    if (typeof value === "string") return plotText(value, 28);
    return Number.isFinite(value) ? Number((value as number).toPrecision(7)) : null;
  });
}
