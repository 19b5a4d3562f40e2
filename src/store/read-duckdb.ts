import { firstLineOf, sqlIdentifier, withDatabaseFile } from "./database.js";
import { tableNotFoundError, unclearTableError, unreadableFileError } from "./errors.js";
import type { ReadOptions } from "./read-options.js";
import { readRelation } from "./read-relation.js";
import type { FileColumns } from "./stored-table.js";

/** Reads a table of a DuckDB database file: the one named, or the only one. */
export async function readDuckdb(
  path: string,
  shownPath: string,
  options: ReadOptions,
): Promise<FileColumns> {
  return withDatabaseFile(path, "READ_ONLY", async (connection) => {
    const listed = await connection.run(
      "SELECT table_name FROM information_schema.tables WHERE table_schema = 'main' ORDER BY table_name",
    );
    const names = (await listed.getRows()).map(([name]) => String(name));
    if (options.table !== undefined && !names.includes(options.table))
      throw tableNotFoundError(shownPath, options.table, names);
    if (options.table === undefined && names.length !== 1) throw unclearTableError(shownPath, names);
    return readRelation(connection, sqlIdentifier(options.table ?? names[0]!));
  }).catch((cause) => {
    throw cause.name === "ModelError"
      ? cause
      : unreadableFileError(shownPath, "a DuckDB database", firstLineOf(cause, path), cause);
  });
}
