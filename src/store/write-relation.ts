import type { DuckDBConnection } from "@duckdb/node-api";
import { type ColumnTable, rowCount } from "../record/index.js";
import { sqlIdentifier } from "./database.js";
import { notWritableError } from "./errors.js";

const rowsAtOnce = 2048;

/** Creates a table of the database engine from a table of columns. */
export async function writeRelation(
  connection: DuckDBConnection,
  name: string,
  table: ColumnTable,
  shownPath: string,
): Promise<void> {
  checkColumnNames(table.names, shownPath);
  const { DuckDBDataChunk, BOOLEAN, DOUBLE, VARCHAR } = await import("@duckdb/node-api");
  const kinds = table.columns.map(kindOf);
  const types = kinds.map((kind) => ({ number: DOUBLE, boolean: BOOLEAN, text: VARCHAR })[kind]);
  const columns = table.names.map((column, i) => `${sqlIdentifier(column)} ${types[i]}`);
  await connection.run(`CREATE OR REPLACE TABLE ${sqlIdentifier(name)} (${columns.join(", ")})`);
  const appender = await connection.createAppender(name);
  const rows = rowCount(table);
  for (let from = 0; from < rows; from += rowsAtOnce) {
    const to = Math.min(rows, from + rowsAtOnce);
    const chunk = DuckDBDataChunk.create(types, to - from);
    chunk.setColumns(
      table.columns.map((column, i) =>
        Array.from(column.slice(from, to), (cell) => databaseValue(cell, kinds[i]!)),
      ),
    );
    appender.appendDataChunk(chunk);
  }
  appender.closeSync();
}

type Kind = "number" | "boolean" | "text";

function kindOf(column: ColumnTable["columns"][number]): Kind {
  if (column instanceof Float64Array) return "number";
  const cells = column.filter((cell) => !isMissing(cell));
  if (cells.length === 0) return "text";
  if (cells.every((cell) => typeof cell === "number")) return "number";
  return cells.every((cell) => typeof cell === "boolean") ? "boolean" : "text";
}

function isMissing(cell: unknown): boolean {
  return cell === null || cell === undefined || Number.isNaN(cell);
}

function databaseValue(cell: unknown, kind: Kind): number | boolean | string | null {
  if (isMissing(cell)) return null;
  if (kind !== "text") return cell as number | boolean;
  return cell instanceof Date ? cell.toISOString() : String(cell);
}

/** Names in the engine are case-insensitive. */
function checkColumnNames(names: readonly string[], path: string): void {
  const used = new Map<string, string>();
  for (const name of names) {
    const before = used.get(name.toLowerCase());
    if (name === "" || before !== undefined) {
      const reason =
        name === "" ? "a column has no name" : `the columns "${before}" and "${name}" differ only in case`;
      throw notWritableError(path, reason, "Rename the column, or use CSV or JSON.");
    }
    used.set(name.toLowerCase(), name);
  }
}
