import { type Column, isEmpty } from "../record/index.js";
import { withDatabase } from "./database.js";
import type { Relation } from "./relation.js";
import type { FileColumns } from "./stored-table.js";
import { streamColumns } from "./stream-columns.js";

/**
 * Reads a plain text file by the database engine, or gives undefined: where the engine refuses a row that the
 * first ones did not foretell, or a number came through altered. The file is then read cell by cell, where the
 * reason can be told with row, column and value.
 */
export async function readPlainCsv({
  from,
  names,
  kinds,
  selected,
  found,
}: Relation): Promise<FileColumns | undefined> {
  const query = `SELECT ${selected.join(", ")} FROM ${from}`;
  const columns = await withDatabase((connection) => streamColumns(connection, query, kinds)).catch(() => []);
  const last = (columns[0]?.length ?? 0) - 1;
  if (last < 0 || columns.every((column) => isEmpty(column[last])) || columns.some(isAltered))
    return undefined;
  return { names, columns, found };
}

/** A whole number past 2^53 may have lost digits on the way. */
function isAltered(column: Column): boolean {
  if (!(column instanceof Float64Array)) return false;
  for (let row = 0; row < column.length; row++) {
    const value = column[row]!;
    if (value >= Number.MAX_SAFE_INTEGER || value <= -Number.MAX_SAFE_INTEGER) return true;
  }
  return false;
}
