import type { ColumnTable } from "../record/index.js";
import type { Format } from "./read-options.js";

/** How to write a file. */
export interface WriteOptions {
  /** Default: by the file extension. */
  readonly format?: Format;
  /** Delimiter of a text file. Default "," ("\t" for .tsv). */
  readonly delimiter?: string;
  /** Name of the sheet, or of the table in a database file. Default "record". */
  readonly table?: string;
}

/** A table with the name of its sheet or database table. */
export interface NamedTable {
  readonly name: string;
  readonly table: ColumnTable;
}

/** Writes to `path`, a temporary file; messages name the file by `shownPath`. */
export type Writer = (
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  options: WriteOptions,
) => Promise<void>;
