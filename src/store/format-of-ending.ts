import { extname } from "node:path";
import type { Format } from "./read-options.js";

const endings: ReadonlyMap<string, Format> = new Map<string, Format>([
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

/** What the ending of a file's name says it holds. */
export function formatOfEnding(path: string): Format | undefined {
  return endings.get(extname(path).toLowerCase());
}
