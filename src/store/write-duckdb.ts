import { withDatabaseFile } from "./database.js";
import type { NamedTable, WriteOptions } from "./write-options.js";
import { writeRelation } from "./write-relation.js";

/** Writes tables of a DuckDB database file; a table of the same name is replaced, others stay. */
export async function writeDuckdb(
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  _options: WriteOptions,
): Promise<void> {
  await withDatabaseFile(path, "READ_WRITE", async (connection) => {
    for (const { name, table } of tables) await writeRelation(connection, name, table, shownPath);
  });
}
