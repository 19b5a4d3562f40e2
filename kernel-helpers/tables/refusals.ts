import { ModelError } from "../../src/numeric/index.js";

/** Columns of a table must be told apart by their keys. */
export function columnRepeated(key: string, title: string): ModelError {
  return new ModelError(
    "column-repeated",
    `Two columns of the table "${title}" have the key "${key}". Give each column a key of its own.`,
    { key, title },
  );
}

/** A table without columns has nothing to show. */
export function noColumns(title: string): ModelError {
  return new ModelError(
    "no-columns",
    `The table "${title}" has no columns. Name at least one: { key: "period", label: "Period", kind: "integer" }.`,
    { title },
  );
}
