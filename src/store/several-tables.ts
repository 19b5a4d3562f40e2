import { formatOfExtension } from "./file-extension.js";
import type { Format } from "./read-options.js";

/** Whether a file of this format, or with this extension, can hold several tables: a workbook or a database file. */
export function holdsSeveralTables(path: string, format?: Format): boolean {
  return ["excel", "duckdb"].includes(format ?? formatOfExtension(path) ?? "");
}
