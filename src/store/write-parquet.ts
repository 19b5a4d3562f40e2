import { sqlString, withDatabase } from "./database.js";
import type { NamedTable, WriteOptions } from "./write-options.js";
import { writeRelation } from "./write-relation.js";

let written = 0;

/** Writes a Parquet file. */
export async function writeParquet(
  tables: readonly NamedTable[],
  path: string,
  shownPath: string,
  _options: WriteOptions,
): Promise<void> {
  const name = `written_${written++}`;
  await withDatabase(async (connection) => {
    try {
      await writeRelation(connection, name, tables[0]!.table, shownPath);
      await connection.run(`COPY ${name} TO ${sqlString(path)} (FORMAT parquet)`);
    } finally {
      await connection.run(`DROP TABLE IF EXISTS ${name}`);
    }
  });
}
