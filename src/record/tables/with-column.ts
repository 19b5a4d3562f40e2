import type { Column, ColumnTable } from "../column-table.js";
import { optionWrong } from "../refusals.js";

/**
 * The table with a column more behind the others.
 *
 * @throws {ModelError} `option-wrong` when there is a column of that name already.
 */
export function withColumn(table: ColumnTable, name: string, column: Column): ColumnTable {
  if (table.names.includes(name)) throw optionWrong("name", name, "a name that no column of the record has");
  return { ...table, names: [...table.names, name], columns: [...table.columns, column] };
}
