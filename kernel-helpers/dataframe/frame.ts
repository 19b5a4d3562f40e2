import type { DataFrame } from "danfojs-node";
import { estimates, type Fit, points, summary } from "../../src/estimate/index.js";
import type { Differences } from "../../src/record/index.js";
import { tableOfRows } from "../../src/record/index.js";
import type { NamedTable } from "../../src/store/index.js";
import { checkCall } from "../options/index.js";
import { columnsOf, type RecordLike } from "./columns-of.js";
import { isFrame } from "./danfo.js";
import { resultTables } from "./result-tables.js";
import { toFrame } from "./to-frame.js";

/** A result of this package: a plain object with a kind. */
export interface Result {
  readonly kind: string;
}

/** The tables of a fit. */
export interface FitFrames {
  /** One row per parameter. */
  readonly estimates: DataFrame;
  /** One row per period. */
  readonly points: DataFrame;
  /** One row per series. */
  readonly summary: DataFrame;
}

/**
 * Converts to DataFrames: a record, observations or differences to one, a fit to its three tables, any other result to
 * one per list in it, by name.
 *
 * @example frame(fit(rule, counts, { errors: "process" })).estimates
 */
export function frame(record: RecordLike | Differences): DataFrame;
export function frame(fit: Fit): FitFrames;
export function frame(result: Result): Readonly<Record<string, DataFrame>>;
export function frame(
  value: RecordLike | Result,
): DataFrame | FitFrames | Readonly<Record<string, DataFrame>> {
  checkCall("frame", arguments);
  if (isFrame(value)) return value;
  const tables = tablesOf(value);
  const [only] = tables;
  if (only !== undefined && tables.length === 1 && only.name === "record") return toFrame(only.table);
  return Object.freeze(Object.fromEntries(tables.map(({ name, table }) => [name, toFrame(table)])));
}

/** The tables of a record or result; a single table is named "record". */
export function tablesOf(value: RecordLike | Result): readonly NamedTable[] {
  switch ((value as Partial<Result>).kind) {
    case "differences":
      return resultTables({ series: (value as Differences).series }).map(({ table }) => ({
        name: "record",
        table,
      }));
    case "fit":
      return tablesOfFit(value as Fit);
  }
  const { kind } = value as Partial<Result>;
  if (!isFrame(value) && typeof kind === "string" && kind !== "observations") return resultTables(value);
  return [{ name: "record", table: columnsOf(value as RecordLike) }];
}

function tablesOfFit(fit: Fit): readonly NamedTable[] {
  const rows = resultTables({ estimates: estimates(fit), points: points(fit) });
  return [...rows, { name: "summary", table: tableOfRows(summary(fit)) }];
}
