import { type Column, isEmpty } from "../record/index.js";
import { withDatabase } from "./database.js";
import type { Relation } from "./relation.js";
import type { FileColumns } from "./stored-table.js";
import { streamColumns } from "./stream-columns.js";

/**
 * Reads a plain text file with the database engine. Undefined when the engine rejects a row or a number has lost
 * digits: the file is then read cell by cell, so that an error can name row, column and value.
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
  if (last < 0 || columns.every((column) => isEmpty(column[last])) || columns.some(hasLostDigits))
    return undefined;
  return { names, columns, found };
}

/** An integer above 2^53 may have lost digits. */
function hasLostDigits(column: Column): boolean {
  if (!(column instanceof Float64Array)) return false;
  for (let row = 0; row < column.length; row++) {
    const value = column[row]!;
    if (value >= Number.MAX_SAFE_INTEGER || value <= -Number.MAX_SAFE_INTEGER) return true;
  }
  return false;
}
