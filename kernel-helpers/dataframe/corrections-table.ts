import { type ColumnTable, columnNamed, decided, packed, rowCount } from "../../src/record/index.js";

const corrected = " (corrected)";
const leftOut = "left out";

/**
 * A record with its corrections: after the columns as read, a column of corrected values for each corrected column, and
 * one that marks excluded rows, if any.
 */
export function withCorrectionColumns(table: ColumnTable): ColumnTable {
  const { decisions = [] } = table;
  const used = decided(table);
  const names = [...table.names];
  const columns = [...table.columns];
  for (const name of new Set(decisions.map(({ column }) => column))) {
    const isRow = name === "";
    names.push(uniqueName(isRow ? leftOut : `${name}${corrected}`, names));
    columns.push(
      isRow ? rowsOut(table) : packed(Array.from<unknown>(columnNamed(used, name, "a correction"))),
    );
  }
  return { names, columns };
}

/** Notes on columns of corrections in a record that was written and read again. */
export function correctionNotes(names: readonly string[]): readonly string[] {
  const found = names
    .filter((name) => names.includes(`${name}${corrected}`))
    .map(
      (name) =>
        `Column "${name}" has the values as first read; "${name}${corrected}" has the corrected ones. Choose one of the two.`,
    );
  if (names.includes(leftOut))
    found.push(
      `Column "${leftOut}" marks excluded rows; give where: { "${leftOut}": false } to use only the others.`,
    );
  return found;
}

function rowsOut(table: ColumnTable): readonly boolean[] {
  const out = new Set(
    (table.decisions ?? []).filter(({ column }) => column === "").map(({ row }) => row - 1),
  );
  return Array.from({ length: rowCount(table) }, (_, row) => out.has(row));
}

/** Unique without regard to case, as database files require. */
function uniqueName(name: string, taken: readonly string[]): string {
  const known = new Set(taken.map((each) => each.toLowerCase()));
  let chosen = name;
  for (let n = 2; known.has(chosen.toLowerCase()); n++) chosen = `${name} (${n})`;
  return chosen;
}
