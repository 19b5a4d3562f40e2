import { ModelError } from "../../src/numeric/index.js";

/** A figure must have axes and something on them. */
export function emptyFigure(title: string): ModelError {
  return new ModelError(
    "empty-figure",
    `The figure "${title}" has nothing to draw. Give it x, y and layers, or panels that each have a layer.`,
    { title },
  );
}
