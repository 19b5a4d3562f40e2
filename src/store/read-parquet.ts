import { quoted, reasonOf, withDatabase } from "./database.js";
import { readRelation } from "./read-relation.js";
import { unreadableFile } from "./refusals.js";
import type { FileColumns } from "./stored-table.js";

/** Reads a Parquet file. */
export async function readParquet(path: string, shownPath: string): Promise<FileColumns> {
  try {
    return await withDatabase((connection) => readRelation(connection, `read_parquet(${quoted(path)})`));
  } catch (cause) {
    throw unreadableFile(shownPath, "Parquet", reasonOf(cause, path), cause);
  }
}
