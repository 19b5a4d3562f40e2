import { ModelError } from "../../numeric/index.js";
import type { PeriodAxis } from "../period/period-axis.js";
import { unitText } from "../period/unit-text.js";

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

export function rowsOverlap(group: string, first: string, last: string): ModelError {
  const where = group === "" ? "" : ` of "${group}"`;
  return new ModelError(
    "rows-overlap",
    `The new rows${where} begin at ${first}, and the record that the fit already has runs to ${last}. Give only later rows; ` +
      "to change earlier ones, fit the corrected record anew.",
    { group, first, last },
  );
}

export function axesDiffer(record: PeriodAxis, later: PeriodAxis): ModelError {
  const told = ({ column, step, form }: PeriodAxis): string =>
    `"${column}" in steps of ${unitText(step.every, step.of)}, by ${form === "number" ? "number" : "date"}`;
  return new ModelError(
    "axes-differ",
    `The new rows do not lie on the record's periods: the record counts ${told(record)}, the new rows ${told(later)}. ` +
      "Read both with the same `period` and `step`.",
    { record, later },
  );
}
