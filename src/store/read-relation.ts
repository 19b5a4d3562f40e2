import type { DuckDBConnection } from "@duckdb/node-api";
import { relationOf } from "./relation.js";
import type { FileColumns } from "./stored-table.js";
import { streamColumns } from "./stream-columns.js";

/**
 * Reads every column of a table, file or query of the database engine.
 *
 * @param from - SQL after FROM.
 */
export async function readRelation(connection: DuckDBConnection, from: string): Promise<FileColumns> {
  const { names, kinds, selected, found } = await relationOf(connection, from);
  const columns = await streamColumns(connection, `SELECT ${selected.join(", ")} FROM ${from}`, kinds);
  return { names, columns, found };
}
