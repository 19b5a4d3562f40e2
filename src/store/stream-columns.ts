import type { DuckDBConnection, DuckDBDataChunk } from "@duckdb/node-api";
import type { Column } from "../record/index.js";
import { addTexts } from "./text-vector.js";

/** What a column of a query holds: numbers without empty cells (NaN where missing), truth values, or text. */
export type ColumnKind = "number" | "boolean" | "text";

/** Runs a query and gathers its columns piece by piece, so that reading goes on while a piece is unpacked. */
export async function streamColumns(
  connection: DuckDBConnection,
  query: string,
  kinds: readonly ColumnKind[],
): Promise<readonly Column[]> {
  const gathered = kinds.map((kind) => (kind === "number" ? numbers() : cells(kind)));
  const result = await connection.stream(query);
  for (;;) {
    const chunk = await result.fetchChunk();
    const rows = chunk?.rowCount ?? 0;
    if (chunk === null || rows === 0) return gathered.map(({ column }) => column());
    gathered.forEach(({ add }, at) => {
      add(chunk, at, rows);
    });
  }
}

interface Gathered {
  readonly add: (chunk: DuckDBDataChunk, at: number, rows: number) => void;
  readonly column: () => Column;
}

function numbers(): Gathered {
  let values = new Float64Array(4096);
  let count = 0;
  return {
    add(chunk, at, rows) {
      if (count + rows > values.length) {
        const larger = new Float64Array(Math.max(2 * values.length, count + rows));
        larger.set(values.subarray(0, count));
        values = larger;
      }
      const vector = chunk.getColumnVector(at);
      // Not in the package's types: present in the pinned version, and done without where it is not.
      const { items } = vector as unknown as { items?: unknown };
      if (items instanceof Float64Array) values.set(items.subarray(0, rows), count);
      else for (let row = 0; row < rows; row++) values[count + row] = vector.getItem(row) as number;
      count += rows;
    },
    column: () => values.slice(0, count),
  };
}

function cells(kind: "boolean" | "text"): Gathered {
  const gathered: unknown[] = [];
  return {
    add(chunk, at, rows) {
      const vector = chunk.getColumnVector(at);
      if (kind === "text") addTexts(vector, rows, gathered as (string | null)[]);
      else for (let row = 0; row < rows; row++) gathered.push(vector.getItem(row));
    },
    column: () => gathered,
  };
}
