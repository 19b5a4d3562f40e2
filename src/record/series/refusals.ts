import { ModelError } from "../../numeric/index.js";

export function notIncreasing(
  row: number,
  column: string,
  group: string,
  before: string,
  now: string,
): ModelError {
  const where = group === "" ? "" : ` of "${group}"`;
  return new ModelError(
    "not-increasing",
    `Times are not increasing at row ${row}${where}: ${column} ${now} follows ${before}. ` +
      'If several series are mixed, name the column that tells them apart with by. To put the rows in order, say disorder: "sort".',
    { row, column, group, before, now },
  );
}

export interface DuplicateFacts {
  readonly rows: readonly number[];
  readonly column: string;
  readonly group: string;
  readonly period: string;
  readonly values: readonly string[];
}

export function duplicatePeriod(facts: DuplicateFacts, more: number): ModelError {
  const { rows, column, group, period, values } = facts;
  const where = group === "" ? "" : ` in "${group}"`;
  const alike = new Set(values).size === 1 ? "the same value" : "different values";
  const others = more > 0 ? ` ${more} more like it.` : "";
  return new ModelError(
    "duplicate-period",
    `${column} ${period} appears ${rows.length} times${where}, at rows ${rows.join(" and ")}, with ${alike} (${values.join(", ")}).${others} ` +
      'Possible duplicate - keep both? Say duplicates: "average", "first", "last" or "sum", or name the replicates column.',
    { ...facts },
  );
}
