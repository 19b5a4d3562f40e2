import type { DuckDBConnection, DuckDBDataChunk, DuckDBVector } from "@duckdb/node-api";
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
  const pieces: Float64Array[] = [];
  let count = 0;
  return {
    add(chunk, at, rows) {
      pieces.push(numbersOf(chunk.getColumnVector(at), rows));
      count += rows;
    },
    column() {
      const values = new Float64Array(count);
      let from = 0;
      for (const piece of pieces) {
        values.set(piece, from);
        from += piece.length;
      }
      return values;
    },
  };
}

function numbersOf(vector: DuckDBVector, rows: number): Float64Array {
  // Not in the package's types: present in the pinned version, and done without where it is not.
  const { items } = vector as unknown as { items?: unknown };
  if (items instanceof Float64Array) return items.slice(0, rows);
  const values = new Float64Array(rows);
  for (let row = 0; row < rows; row++) values[row] = vector.getItem(row) as number;
  return values;
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
