import type { Column, ColumnTable } from "../record/index.js";

/** Where a record came from, so that a colleague can tell whether the same file is read again. */
export interface RecordSource {
  /** As the analyst wrote it. */
  readonly path: string;
  readonly format: string;
  /** SHA-256 of the file's bytes, hexadecimal. */
  readonly checksum: string;
  readonly bytes: number;
  readonly rows: number;
  /** What was found out about the file, each a whole sentence. */
  readonly found: readonly string[];
}

/** A record as it was read, with its source. */
export interface StoredTable extends ColumnTable {
  readonly source: RecordSource;
}

/** Columns of a file with what was found out about it. */
export interface FileColumns {
  readonly names: readonly string[];
  readonly columns: readonly Column[];
  readonly found: readonly string[];
}
