import { count, plural } from "../wording/index.js";
import { downsample } from "./downsample.js";
import type { Figure } from "./figure.js";

/** A sentence for every downsampled layer. */
export function downsamplingNotes(figure: Figure): string[] {
  const notes = figure.panels
    .flatMap((panel) => panel.layers)
    .flatMap((layer) => {
      if (layer.mark !== "points" && layer.mark !== "line") return [];
      const few = downsample(layer.x, layer.y);
      if (few === undefined) return [];
      return [
        `${layer.name}: ${count(few.kept.length)} of ${plural(few.of, "point")} plotted, including all extremes.`,
      ];
    });
  return [...new Set(notes)];
}
