import { oneLine } from "../tables/index.js";
import type { Figure } from "./figure.js";
import { figureAccount } from "./figure-account.js";

/** A figure where nothing can be drawn: its title, what it shows in words, its notes, and its numbers. */
export function figureText(figure: Figure, numbers: readonly string[], notes: readonly string[]): string {
  const words = [figure.title, ...figureAccount(figure), ...notes].map(oneLine);
  return [words.join("\n"), ...numbers].join("\n\n");
}
