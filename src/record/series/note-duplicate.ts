import type { FindingLog } from "../finding-log.js";
import type { DuplicateChoice } from "../observation-options.js";
import type { PlacedRows } from "../period/placed-rows.js";
import type { ReadColumn, ReadColumns } from "../read-columns.js";

/** A column with several cells in one period, and the one value made of them. */
export interface DoubledColumn {
  readonly column: ReadColumn;
  readonly now: number;
}

const doneFor: Readonly<Record<DuplicateChoice, string>> = {
  average: "averaged",
  sum: "added up",
  first: "the first kept",
  last: "the last kept",
  refuse: "",
};

/** Notes rows of one period, and enters what became of every column as a decision: no cell goes without a trace. */
export function noteDuplicate(
  run: Int32Array,
  doubled: readonly DoubledColumn[],
  columns: ReadColumns,
  periods: PlacedRows,
  log: FindingLog,
): void {
  const rows = Array.from(run, (row) => row + 1).join(" and ");
  const values = valuesOf(run, columns);
  const alike = new Set(values).size === 1 ? "the same value" : "different values";
  const left = doubled.filter(
    ({ column: { measured, doubled } }) => measured === undefined && doubled !== "sum",
  );
  const remarks = left.map(({ column }) => {
    const cells = cellsOf(run, column).join(", ");
    return ` Of ${column.column} (${cells}) one is used as well; if it is a flow, write measured: { ${column.name}: "flow" }.`;
  });
  log.note({
    kind: "duplicate-period",
    row: run[1]! + 1,
    column: periods.column,
    value: values.join(", "),
    message: `${periods.column} ${periods.written(run[0]!)} appears ${run.length} times, at rows ${rows}, with ${alike} (${values.join(", ")}).${remarks.join("")}`,
    done: doneWords(doubled),
  });
  for (const { column, now } of doubled) {
    log.decide({
      row: run[0]! + 1,
      column: column.column,
      was: cellsOf(run, column).join(", "),
      now,
      why: `rows ${rows} are of one period; ${column.doubledWhy}`,
      who: "",
    });
  }
}

/** "the last kept", or "owed: the last kept; paid: added up" where columns differ. */
function doneWords(doubled: readonly DoubledColumn[]): string {
  const words = new Set(doubled.map(({ column }) => doneFor[column.doubled]));
  if (words.size === 1) return [...words][0]!;
  return doubled.map(({ column }) => `${column.column}: ${doneFor[column.doubled]}`).join("; ");
}

function cellsOf(run: Int32Array, { values }: ReadColumn): readonly number[] {
  return Array.from(run, (row) => values[row]!).filter((value) => !Number.isNaN(value));
}

/** The states of each row of a period, as they are quoted. */
export function valuesOf(run: Int32Array, { states }: ReadColumns): string[] {
  return Array.from(run, (row) =>
    states.map(({ values }) => (Number.isNaN(values[row]!) ? "empty" : values[row]!)).join(" / "),
  );
}
