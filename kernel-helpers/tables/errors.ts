import { ModelError } from "../../src/numeric/index.js";

export function duplicateColumnError(key: string, title: string): ModelError {
  return new ModelError(
    "column-repeated",
    `Table "${title}" has two columns with the key "${key}". Give each column its own \`key\`.`,
    { key, title },
  );
}

export function noColumnsError(title: string): ModelError {
  return new ModelError(
    "no-columns",
    `Table "${title}" has no columns. Give at least one, such as { key: "period", label: "Period", kind: "integer" }.`,
    { title },
  );
}

export function unknownColumnKindError(kind: string, key: string, known: readonly string[]): ModelError {
  return new ModelError(
    "unknown-column-kind",
    `Column "${key}" has the unknown kind "${kind}". Give \`kind\`: ${known.map((one) => `"${one}"`).join(", ")}.`,
    { kind, key, known },
  );
}
