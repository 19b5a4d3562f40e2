import type { DataFrame } from "danfojs-node";
import { type Column, type ColumnTable, rowCount } from "../../src/record/index.js";
import { withCorrectionColumns } from "./corrections-table.js";
import { danfo } from "./danfo.js";
import { attachNotes } from "./frame-notes.js";
import { showFrames } from "./show-frames.js";

/**
 * A danfo DataFrame of a table. A missing number is NaN in the frame, because danfo's arithmetic treats null as zero; any
 * other missing cell is null.
 *
 * danfo makes a property of every column name, so it cannot have the name of one of its members (`index`, `values`,
 * `shape`), an empty name or a repeated one: such a column is called "values (column)", and the functions of this
 * package still find it by its original name.
 */
export function toFrame(record: ColumnTable): DataFrame {
  const table = withCorrectionColumns(record);
  const names = frameNames(table.names);
  const dtypes = table.columns.map(kindOf);
  const rows = Array.from({ length: rowCount(table) }, (_, row) =>
    table.columns.map((column, at) => column[row] ?? (dtypes[at] === "float32" ? Number.NaN : null)),
  );
  const frame = new (danfo().DataFrame)(rows, { columns: [...names], dtypes });
  showFrames();
  const renamed = names.some((name, i) => name !== table.names[i]);
  attachNotes(frame, {
    ...(renamed && { names: table.names }),
    ...(record.decisions && { decisions: record.decisions, raw: record.names.length }),
  });
  return frame;
}

/** danfo infers the kind of a column from its first rows; here every cell is checked. */
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
