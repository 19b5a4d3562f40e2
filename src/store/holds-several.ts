import { formatOfEnding } from "./format-of-ending.js";
import type { Format } from "./read-options.js";

/** Whether a file of this format, else of this name, holds more than one table: a workbook or a database file. */
export function holdsSeveral(path: string, format?: Format): boolean {
  return ["excel", "duckdb"].includes(format ?? formatOfEnding(path) ?? "");
}
