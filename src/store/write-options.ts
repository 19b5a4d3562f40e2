import type { ColumnTable } from "../record/index.js";
import type { Format } from "./read-options.js";

/** How to write a file. */
export interface WriteOptions {
  /** What the file holds; default what its extension says. */
  readonly format?: Format;
  /** What separates the cells of a text file; default "," (a tab for .tsv). */
  readonly delimiter?: string;
  /** Name of the sheet, or of the table in a database file; default "record". */
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
