import type { DuckDBConnection } from "@duckdb/node-api";
import { identifier } from "./database.js";
import type { ColumnKind } from "./stream-columns.js";

/** A table, file or query of the database engine, and how its columns are read from it. */
export interface Relation {
  /** SQL that stands after FROM. */
  readonly from: string;
  readonly names: readonly string[];
  readonly kinds: readonly ColumnKind[];
  /** SQL of each column, by its kind. */
  readonly selected: readonly string[];
  readonly found: readonly string[];
}

const numeric = /^(TINYINT|SMALLINT|INTEGER|UTINYINT|USMALLINT|UINTEGER|FLOAT|DOUBLE|DECIMAL)/;
const long = /^(BIGINT|UBIGINT|HUGEINT|UHUGEINT)$/;

/** Asks the engine what columns there are: numbers are read as doubles, dates and anything else as text. */
export async function relationOf(connection: DuckDBConnection, from: string): Promise<Relation> {
  const described = await (await connection.run(`DESCRIBE SELECT * FROM ${from}`)).getRows();
  const columns = described.map(([name, type]) => ({ name: String(name), type: String(type) }));
  const wide = await tooLong(
    connection,
    from,
    columns.filter(({ type }) => long.test(type)).map(({ name }) => name),
  );
  const kinds = columns.map(({ name, type }) => (wide.includes(name) ? "text" : kindOf(type)));
  return {
    from,
    names: columns.map(({ name }) => name),
    kinds,
    selected: columns.map(({ name }, i) => selectedAs(identifier(name), kinds[i]!)),
    found: wide.map(
      (name) => `Whole numbers of "${name}" are longer than a number keeps and are read as text.`,
    ),
  };
}

function kindOf(type: string): ColumnKind {
  if (numeric.test(type) || long.test(type)) return "number";
  return type === "BOOLEAN" ? "boolean" : "text";
}

/** A missing number is selected as NaN: a column without empty cells is read without asking each whether it is there. */
export function selectedAs(name: string, kind: ColumnKind): string {
  if (kind === "number") return `coalesce(CAST(${name} AS DOUBLE), 'nan'::DOUBLE)`;
  return kind === "boolean" ? name : `CAST(${name} AS VARCHAR)`;
}

/** Of columns of long whole numbers, those that hold one past 2^53, which a double would alter. */
async function tooLong(
  connection: DuckDBConnection,
  from: string,
  names: readonly string[],
): Promise<readonly string[]> {
  if (names.length === 0) return [];
  const tests = names.map(
    (name) => `coalesce(max(abs(CAST(${identifier(name)} AS HUGEINT))) > 9007199254740991, false)`,
  );
  const [row] = await (await connection.run(`SELECT ${tests.join(", ")} FROM ${from}`)).getRows();
  return names.filter((_, i) => row?.[i] === true);
}
