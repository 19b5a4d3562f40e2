import type { DuckDBConnection } from "@duckdb/node-api";
import { sqlIdentifier } from "./database.js";
import type { ColumnKind } from "./stream-columns.js";

/** A table, file or query of the database engine, and how its columns are read. */
export interface Relation {
  /** SQL after FROM. */
  readonly from: string;
  readonly names: readonly string[];
  readonly kinds: readonly ColumnKind[];
  /** SQL expression of each column. */
  readonly selected: readonly string[];
  readonly found: readonly string[];
}

const numeric = /^(TINYINT|SMALLINT|INTEGER|UTINYINT|USMALLINT|UINTEGER|FLOAT|DOUBLE|DECIMAL)/;
const integer64 = /^(BIGINT|UBIGINT|HUGEINT|UHUGEINT)$/;

/** Asks the engine for its columns: numbers are read as doubles, dates and anything else as text. */
export async function relationOf(connection: DuckDBConnection, from: string): Promise<Relation> {
  const described = await (await connection.run(`DESCRIBE SELECT * FROM ${from}`)).getRows();
  const columns = described.map(([name, type]) => ({ name: String(name), type: String(type) }));
  const beyondDoubles = await columnsBeyondDoubles(
    connection,
    from,
    columns.filter(({ type }) => integer64.test(type)).map(({ name }) => name),
  );
  const kinds = columns.map(({ name, type }) => (beyondDoubles.includes(name) ? "text" : kindOf(type)));
  return {
    from,
    names: columns.map(({ name }) => name),
    kinds,
    selected: columns.map(({ name }, i) => selectExpression(sqlIdentifier(name), kinds[i]!)),
    found: beyondDoubles.map(
      (name) => `Column "${name}" has integers above 2^53; it is read as text so that no digit is lost.`,
    ),
  };
}

function kindOf(type: string): ColumnKind {
  if (numeric.test(type) || integer64.test(type)) return "number";
  return type === "BOOLEAN" ? "boolean" : "text";
}

/** A missing number is selected as NaN, so that a column can be read without a validity check per cell. */
export function selectExpression(name: string, kind: ColumnKind): string {
  if (kind === "number") return `coalesce(CAST(${name} AS DOUBLE), 'nan'::DOUBLE)`;
  return kind === "boolean" ? name : `CAST(${name} AS VARCHAR)`;
}

/** Integer columns with a value above 2^53, which a double cannot hold. */
async function columnsBeyondDoubles(
  connection: DuckDBConnection,
  from: string,
  names: readonly string[],
): Promise<readonly string[]> {
  if (names.length === 0) return [];
  const tests = names.map(
    (name) => `coalesce(max(abs(CAST(${sqlIdentifier(name)} AS HUGEINT))) > 9007199254740991, false)`,
  );
  const [row] = await (await connection.run(`SELECT ${tests.join(", ")} FROM ${from}`)).getRows();
  return names.filter((_, i) => row?.[i] === true);
}
