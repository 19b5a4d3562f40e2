import { firstLineOf, sqlString, withDatabase } from "./database.js";
import { unreadableFileError } from "./errors.js";
import { readRelation } from "./read-relation.js";
import type { FileColumns } from "./stored-table.js";

/** Reads a Parquet file. */
export async function readParquet(path: string, shownPath: string): Promise<FileColumns> {
  try {
    return await withDatabase((connection) => readRelation(connection, `read_parquet(${sqlString(path)})`));
  } catch (cause) {
    throw unreadableFileError(shownPath, "Parquet", firstLineOf(cause, path), cause);
  }
}
