import type { DuckDBConnection, DuckDBInstance } from "@duckdb/node-api";

let memoryDatabase: Promise<DuckDBInstance> | undefined;

/** Runs work on a connection of the in-memory database, which is loaded on first use. */
export async function withDatabase<T>(work: (connection: DuckDBConnection) => Promise<T>): Promise<T> {
  memoryDatabase ??= import("@duckdb/node-api").then(({ DuckDBInstance }) =>
    DuckDBInstance.create(":memory:"),
  );
  const connection = await (await memoryDatabase).connect();
  try {
    return await work(connection);
  } finally {
    connection.closeSync();
  }
}

/** Runs work on a connection of a database file, which is closed afterwards. */
export async function withDatabaseFile<T>(
  path: string,
  access: "READ_ONLY" | "READ_WRITE",
  work: (connection: DuckDBConnection) => Promise<T>,
): Promise<T> {
  const { DuckDBInstance } = await import("@duckdb/node-api");
  const instance = await DuckDBInstance.create(path, { access_mode: access });
  const connection = await instance.connect();
  try {
    return await work(connection);
  } finally {
    connection.closeSync();
    instance.closeSync();
  }
}

/** The first line of an error of the engine, without the absolute path. */
export function firstLineOf(cause: unknown, path: string): string {
  const text = cause instanceof Error ? cause.message : String(cause);
  return text.split("\n", 1)[0]!.replaceAll(path, "the file").replace(/\.$/, "");
}

/** A string as an SQL literal. */
export function sqlString(text: string): string {
  return `'${text.replaceAll("'", "''")}'`;
}

/** A name as an SQL identifier. */
export function sqlIdentifier(name: string): string {
  return `"${name.replaceAll('"', '""')}"`;
}
