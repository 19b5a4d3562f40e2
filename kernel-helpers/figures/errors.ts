import { ModelError } from "../../src/numeric/index.js";

export function emptyFigureError(title: string): ModelError {
  return new ModelError(
    "empty-figure",
    `Figure "${title}" is empty. Give \`x\`, \`y\` and \`layers\`, or \`panels\` with at least one layer each.`,
    { title },
  );
}
