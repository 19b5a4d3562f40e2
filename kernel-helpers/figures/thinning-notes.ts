import { count } from "../wording/index.js";
import type { Figure } from "./figure.js";
import { thinned } from "./thinned.js";

/** A sentence for every layer of which not all points are drawn. */
export function thinningNotes(figure: Figure): string[] {
  const notes = figure.panels
    .flatMap((panel) => panel.layers)
    .flatMap((layer) => {
      if (layer.mark !== "points" && layer.mark !== "line") return [];
      const few = thinned(layer.x, layer.y);
      if (few === undefined) return [];
      return [
        `${layer.name}: ${count(few.kept.length)} of ${count(few.of)} points are drawn, every extreme among them.`,
      ];
    });
  return [...new Set(notes)];
}
