import { type ColumnTable, columnNamed, decided, packed, rowCount } from "../../src/record/index.js";

const corrected = " (corrected)";
const leftOut = "left out";

/**
 * A record as it is shown and written: behind the columns as they were read, a column of what is used instead for
 * every column with a correction, and one that tells which rows are left out, where any is.
 */
export function shownTable(table: ColumnTable): ColumnTable {
  const { decisions = [] } = table;
  const used = decided(table);
  const names = [...table.names];
  const columns = [...table.columns];
  for (const name of new Set(decisions.map(({ column }) => column))) {
    const isRow = name === "";
    names.push(free(isRow ? leftOut : `${name}${corrected}`, names));
    columns.push(
      isRow ? rowsOut(table) : packed(Array.from<unknown>(columnNamed(used, name, "a correction"))),
    );
  }
  return { names, columns };
}

/** What columns of these names say that a written record brings back, each a whole sentence. */
export function marksFound(names: readonly string[]): readonly string[] {
  const found = names
    .filter((name) => names.includes(`${name}${corrected}`))
    .map(
      (name) =>
        `"${name}" is as it was first read; what was used instead stands in "${name}${corrected}". Name the one you mean.`,
    );
  if (names.includes(leftOut))
    found.push(
      `"${leftOut}" may mark rows that were left out: where: { "${leftOut}": false } takes the others.`,
    );
  return found;
}

function rowsOut(table: ColumnTable): readonly boolean[] {
  const out = new Set(
    (table.decisions ?? []).filter(({ column }) => column === "").map(({ row }) => row - 1),
  );
  return Array.from({ length: rowCount(table) }, (_, row) => out.has(row));
}

/** A database file does not tell capital letters from small ones. */
function free(name: string, taken: readonly string[]): string {
  const known = new Set(taken.map((each) => each.toLowerCase()));
  let chosen = name;
  for (let n = 2; known.has(chosen.toLowerCase()); n++) chosen = `${name} (${n})`;
  return chosen;
}
