import { type ColumnTable, isEmpty } from "../column-table.js";
import type { RowGroup } from "../series/group-rows.js";
import { mixedUnits } from "./refusals.js";

const unitColumn = /^(unit|units|currency)$/i;

/**
 * Refuses a series whose rows state different units or currencies: no rule holds across them.
 *
 * @throws {ModelError} `mixed-units`, with the first two rows that differ.
 */
export function refuseMixedUnits(table: ColumnTable, groups: readonly RowGroup[]): void {
  table.names.forEach((name, at) => {
    if (!unitColumn.test(name.trim())) return;
    const column = table.columns[at]!;
    for (const group of groups) {
      const stated = group.rows.filter((row) => !isEmpty(column[row]));
      const first = stated[0];
      const other = stated.find((row) => String(column[row]) !== String(column[first!]));
      if (first !== undefined && other !== undefined)
        throw mixedUnits(
          name,
          group.name,
          { row: first + 1, unit: String(column[first]) },
          { row: other + 1, unit: String(column[other]) },
        );
    }
  });
}
