import type { DataFrame } from "danfojs-node";
import { type Column, type ColumnTable, rowCount } from "../../src/record/index.js";
import { danfo } from "./danfo.js";
import { noteFrame } from "./frame-notes.js";
import { showFrames } from "./show-frames.js";
import { shownTable } from "./shown-table.js";

/**
 * A danfo DataFrame of a table. A missing number is NaN in the frame, because danfo's arithmetic counts null as
 * zero; any other missing cell is null.
 *
 * danfo makes a property of every column name, so a name that one of its own members has (`index`, `values`,
 * `shape`), an empty one and a second equal one cannot be carried: such a column is called "values (column)",
 * and the commands of this package still know it by the record's name.
 */
export function toFrame(record: ColumnTable): DataFrame {
  const table = shownTable(record);
  const names = frameNames(table.names);
  const dtypes = table.columns.map(kindOf);
  const rows = Array.from({ length: rowCount(table) }, (_, row) =>
    table.columns.map((column, at) => column[row] ?? (dtypes[at] === "float32" ? Number.NaN : null)),
  );
  const frame = new (danfo().DataFrame)(rows, { columns: [...names], dtypes });
  showFrames();
  const renamed = names.some((name, i) => name !== table.names[i]);
  noteFrame(frame, {
    ...(renamed && { names: table.names }),
    ...(record.decisions && { decisions: record.decisions, raw: record.names.length }),
  });
  return frame;
}

/** danfo guesses a column's kind from its first rows; here every cell is asked. */
function kindOf(column: Column): string {
  if (column instanceof Float64Array) return "float32";
  const cells = column.filter((cell) => cell !== null && cell !== undefined);
  if (cells.length > 0 && cells.every((cell) => typeof cell === "number")) return "float32";
  if (cells.length > 0 && cells.every((cell) => typeof cell === "boolean")) return "boolean";
  return "string";
}

function frameNames(names: readonly string[]): readonly string[] {
  const members = new (danfo().DataFrame)([[0]], { columns: ["\0"] });
  const taken = new Set<string>();
  return names.map((name, i) => {
    const plain = name === "" ? `column ${i + 1}` : name in members ? `${name} (column)` : name;
    let free = plain;
    for (let n = 2; taken.has(free); n++) free = `${plain} (${n})`;
    taken.add(free);
    return free;
  });
}
