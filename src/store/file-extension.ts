import { extname } from "node:path";
import type { Format } from "./read-options.js";

const extensions: ReadonlyMap<string, Format> = new Map<string, Format>([
  [".csv", "csv"],
  [".txt", "csv"],
  [".tsv", "tsv"],
  [".tab", "tsv"],
  [".json", "json"],
  [".jsonl", "json"],
  [".ndjson", "json"],
  [".parquet", "parquet"],
  [".xlsx", "excel"],
  [".xls", "excel"],
  [".xlsm", "excel"],
  [".duckdb", "duckdb"],
  [".ddb", "duckdb"],
]);

/** The format that a file extension stands for. */
export function formatOfExtension(path: string): Format | undefined {
  return extensions.get(extname(path).toLowerCase());
}
