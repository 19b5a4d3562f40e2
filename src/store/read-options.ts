/** File formats. */
export type Format = "csv" | "tsv" | "json" | "parquet" | "excel" | "duckdb";

/** How to read a file where its contents leave it open. */
export interface ReadOptions {
  /** Default: by the file extension. */
  readonly format?: Format;
  /** Delimiter of a text file: ",", ";", "\t" or "|". Default: detected. */
  readonly delimiter?: string;
  /** Decimal sign of a text file; the other sign is then read as thousands separator. Default: detected. */
  readonly decimal?: "." | ",";
  /** Order of dates written with numbers, or "text" to leave them unchanged. Default: detected. */
  readonly dates?: "day-month-year" | "month-day-year" | "text";
  /** Texts that mean a missing value, such as `["n.d.", "NA"]`. An empty cell always does. */
  readonly missing?: readonly string[];
  /** Encoding of a text file, such as "windows-1252". Default: UTF-8, or as its byte-order mark says. */
  readonly encoding?: string;
  /** Number of lines above the header. Default 0. */
  readonly skip?: number;
  /** Whether the first row has the column names. Default true. */
  readonly header?: boolean;
  /** Sheet of a workbook, or table of a database file; required when there are several. */
  readonly table?: string;
}
