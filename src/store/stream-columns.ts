import type { DuckDBConnection, DuckDBDataChunk, DuckDBVector } from "@duckdb/node-api";
import type { Column } from "../record/index.js";
import { appendTexts } from "./text-vector.js";

/** Kind of a query column: numbers (NaN where missing), booleans, or text. */
export type ColumnKind = "number" | "boolean" | "text";

/** Runs a query and collects its columns chunk by chunk, so that reading overlaps with unpacking. */
export async function streamColumns(
  connection: DuckDBConnection,
  query: string,
  kinds: readonly ColumnKind[],
): Promise<readonly Column[]> {
  const builders = kinds.map((kind) => (kind === "number" ? numberBuilder() : cellBuilder(kind)));
  const result = await connection.stream(query);
  for (;;) {
    const chunk = await result.fetchChunk();
    const rows = chunk?.rowCount ?? 0;
    if (chunk === null || rows === 0) return builders.map(({ column }) => column());
    builders.forEach(({ add }, at) => {
      add(chunk, at, rows);
    });
  }
}

interface ColumnBuilder {
  readonly add: (chunk: DuckDBDataChunk, at: number, rows: number) => void;
  readonly column: () => Column;
}

function numberBuilder(): ColumnBuilder {
  const pieces: Float64Array[] = [];
  let count = 0;
  return {
    add(chunk, at, rows) {
      pieces.push(vectorNumbers(chunk.getColumnVector(at), rows));
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

function vectorNumbers(vector: DuckDBVector, rows: number): Float64Array {
  // Not in the types of the package: present in the pinned version, with a fallback where it is not.
  const { items } = vector as unknown as { items?: unknown };
  if (items instanceof Float64Array) return items.slice(0, rows);
  const values = new Float64Array(rows);
  for (let row = 0; row < rows; row++) values[row] = vector.getItem(row) as number;
  return values;
}

function cellBuilder(kind: "boolean" | "text"): ColumnBuilder {
  const gathered: unknown[] = [];
  return {
    add(chunk, at, rows) {
      const vector = chunk.getColumnVector(at);
      if (kind === "text") appendTexts(vector, rows, gathered as (string | null)[]);
      else for (let row = 0; row < rows; row++) gathered.push(vector.getItem(row));
    },
    column: () => gathered,
  };
}
