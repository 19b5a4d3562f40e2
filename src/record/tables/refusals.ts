import { ModelError } from "../../numeric/index.js";

export function twoCells(first: number, second: number, name: string): ModelError {
  return new ModelError(
    "two-cells",
    `Rows ${first} and ${second} both give the cell "${name}" of one row of the wide table. ` +
      "Keep another column that tells them apart, or correct one of the rows.",
    { first, second, name },
  );
}
