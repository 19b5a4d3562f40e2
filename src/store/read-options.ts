/** File formats. */
export type Format = "csv" | "tsv" | "json" | "parquet" | "excel" | "duckdb";

/** How to read a file where its contents leave it open. */
export interface ReadOptions {
  /** What the file holds; default what its extension says. */
  readonly format?: Format;
  /** What separates the cells of a text file: ",", ";", a tab or "|"; found where the file shows it. */
  readonly delimiter?: string;
  /** Decimal sign of a text file; the other sign is then taken as separator of thousands. */
  readonly decimal?: "." | ",";
  /** Order of dates written with numbers, or "text" to leave them as they are. */
  readonly dates?: "day-month-year" | "month-day-year" | "text";
  /** Texts that mean a missing value, such as `["n.d.", "NA"]`; an empty cell always does. */
  readonly missing?: readonly string[];
  /** Encoding of a text file, such as "windows-1252"; default UTF-8, or what its byte-order mark says. */
  readonly encoding?: string;
  /** Lines above the header; default 0. */
  readonly skip?: number;
  /** Whether the first row names the columns; default true. */
  readonly header?: boolean;
  /** Sheet of a workbook, or table of a database; needed where there are several. */
  readonly table?: string;
}
