import type { Column, ColumnTable } from "../record/index.js";

/** Origin of a record, so that a later reader can check that the file is the same. */
export interface RecordSource {
  /** As written in the notebook. */
  readonly path: string;
  readonly format: string;
  /** SHA-256 of the file's bytes, hexadecimal. */
  readonly checksum: string;
  readonly bytes: number;
  readonly rows: number;
  /** Notes about how the file was read, each a sentence. */
  readonly found: readonly string[];
}

/** A record with its source. */
export interface StoredTable extends ColumnTable {
  readonly source: RecordSource;
}

/** Columns of a file with notes about how it was read. */
export interface FileColumns {
  readonly names: readonly string[];
  readonly columns: readonly Column[];
  readonly found: readonly string[];
}
