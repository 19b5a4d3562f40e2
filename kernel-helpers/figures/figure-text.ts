import { oneLine } from "../tables/index.js";
import type { Figure } from "./figure.js";
import { describeFigure } from "./figure-description.js";

/** A figure as plain text: title, description, notes and data. */
export function figureText(figure: Figure, numbers: readonly string[], notes: readonly string[]): string {
  const words = [figure.title, ...describeFigure(figure), ...notes].map(oneLine);
  return [words.join("\n"), ...numbers].join("\n\n");
}
