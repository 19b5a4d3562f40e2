import type { ColumnTable } from "../record/index.js";
import type { Format } from "./read-options.js";

/** How to write a file. */
export interface WriteOptions {
  /** What the file holds; default what the ending of its name says. */
  readonly format?: Format;
  /** What separates the cells of a text file; default "," (a tab for .tsv). */
  readonly delimiter?: string;
  /** Name of the sheet, or of the table in a database file; default "record". */
  readonly table?: string;
}

/** A table with the name of its sheet or of its place in a database file. */
export interface NamedTable {
  readonly name: string;
  readonly table: ColumnTable;
}

/** Writes to `path`, which nobody else reads yet; messages name the file as the analyst wrote it. */
export type Writer = (
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  options: WriteOptions,
) => Promise<void>;
