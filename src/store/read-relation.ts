import type { DuckDBConnection } from "@duckdb/node-api";
import { identifier } from "./database.js";
import type { FileColumns } from "./stored-table.js";
import { type ColumnKind, streamColumns } from "./stream-columns.js";

const numeric = /^(TINYINT|SMALLINT|INTEGER|UTINYINT|USMALLINT|UINTEGER|FLOAT|DOUBLE|DECIMAL)/;
const long = /^(BIGINT|UBIGINT|HUGEINT|UHUGEINT)$/;

/**
 * Reads every column of a table, file or query of the database engine: numbers as doubles, truth values as
 * they are, dates and times as ISO text, anything else as its text.
 *
 * @param relation - SQL that stands after FROM.
 */
export async function readRelation(connection: DuckDBConnection, relation: string): Promise<FileColumns> {
  const described = await (await connection.run(`DESCRIBE SELECT * FROM ${relation}`)).getRows();
  const columns = described.map(([name, type]) => ({ name: String(name), type: String(type) }));
  const wide = await tooLong(
    connection,
    relation,
    columns.filter(({ type }) => long.test(type)).map(({ name }) => name),
  );
  const kinds = columns.map(({ name, type }) => (wide.includes(name) ? "text" : kindOf(type)));
  const selected = columns.map(({ name }, i) => castOf(identifier(name), kinds[i]!));
  const read = await streamColumns(connection, `SELECT ${selected.join(", ")} FROM ${relation}`, kinds);
  return {
    names: columns.map(({ name }) => name),
    columns: read,
    found: wide.map(
      (name) => `Whole numbers of "${name}" are longer than a number keeps and are read as text.`,
    ),
  };
}

function kindOf(type: string): ColumnKind {
  if (numeric.test(type) || long.test(type)) return "number";
  return type === "BOOLEAN" ? "boolean" : "text";
}

function castOf(name: string, kind: ColumnKind): string {
  if (kind === "number") return `coalesce(CAST(${name} AS DOUBLE), 'nan'::DOUBLE)`;
  return kind === "boolean" ? name : `CAST(${name} AS VARCHAR)`;
}

/** Of columns of long whole numbers, those that hold one past 2^53, which a double would alter. */
async function tooLong(
  connection: DuckDBConnection,
  relation: string,
  names: readonly string[],
): Promise<readonly string[]> {
  if (names.length === 0) return [];
  const tests = names.map(
    (name) => `coalesce(max(abs(CAST(${identifier(name)} AS HUGEINT))) > 9007199254740991, false)`,
  );
  const [row] = await (await connection.run(`SELECT ${tests.join(", ")} FROM ${relation}`)).getRows();
  return names.filter((_, i) => row?.[i] === true);
}
