import type { DataFrame } from "danfojs-node";
import {
  type FillOptions,
  filled,
  type LongerOptions,
  longer as longerTable,
  toPeriods as periodTable,
  type ShiftOptions,
  shifted,
  type ToPeriodsOptions,
  type WiderOptions,
  type WindowOptions,
  wider as widerTable,
  windowed,
} from "../../src/record/index.js";
import { columnsOf, type RecordLike, toFrame } from "../dataframe/index.js";
import { checkCall } from "../options/index.js";
import { caseLog } from "./case-log.js";

/**
 * Adds the value of a column some periods before (or, negative, after) each row; missing where no row stands
 * there.
 *
 * @example shift(readings, { column: "density", period: "hour", step: { every: 12, of: "hour" }, by: "flask" }).columns.at(-1) // "density, 1 before"
 */
export function shift(record: RecordLike, options: ShiftOptions): DataFrame {
  checkCall("shift", arguments);
  return toFrame(shifted(columnsOf(record), options));
}

/**
 * Adds a summary of the last `over` periods of a column at each row. Periods are counted, not rows: a window with
 * a gap has no value, unless `needed` says that fewer do.
 *
 * @example rolling({ week: [1, 2, 3], sold: [4, 6, 8] }, { column: "sold", over: 2, take: "mean", period: "week", step: "week" }).values[2][2] // 7
 */
export function rolling(record: RecordLike, options: WindowOptions & { readonly over: number }): DataFrame {
  checkCall("rolling", arguments);
  return toFrame(windowed(columnsOf(record), options));
}

/**
 * Adds a summary of a column from the first row of its series up to each row.
 *
 * @example expanding({ week: [1, 2, 3], sold: [4, 6, 8] }, { column: "sold", take: "sum", period: "week", step: "week" }).values[2][2] // 18
 */
export function expanding(record: RecordLike, options: Omit<WindowOptions, "over">): DataFrame {
  checkCall("expanding", arguments);
  return toFrame(windowed(columnsOf(record), options));
}

/**
 * One row a longer period: a flow adds up, a level is its last one, as `take` says of each column. A period in
 * which a value is missing has none.
 *
 * @example
 * const days = { date: ["2026-03-30", "2026-03-31", "2026-04-01"], sold: [4, 6, 8] };
 * toPeriods(days, { period: "date", step: "day", to: "month", take: { sold: "sum" } }).values[0][1] // 10
 */
export function toPeriods(record: RecordLike, options: ToPeriodsOptions): DataFrame {
  checkCall("toPeriods", arguments);
  return toFrame(periodTable(columnsOf(record), options));
}

/**
 * Fills the empty cells of a column, and the periods that have no row, by a rule that you state: the value before
 * ("previous"), a line between the neighbours ("between"), or a number. A column tells which cells were filled,
 * and the case's log says by which rule.
 *
 * @example fill({ week: [1, 2, 4], sold: [4, 6, 10] }, { column: "sold", with: "between", period: "week", step: "week" }).values[2] // [3, 8, true]
 */
export function fill(record: RecordLike, options: FillOptions): DataFrame {
  checkCall("fill", arguments);
  caseLog.noteStep(
    `empty cells of "${options.column}" filled: ${typeof options.with === "number" ? `with ${options.with}` : options.with}`,
  );
  return toFrame(filled(columnsOf(record), options));
}

/**
 * One row a period, one column a series.
 *
 * @example wider({ week: [1, 1], item: ["rope", "tar"], sold: [4, 6] }, { keep: "week", names: "item", values: "sold" }).columns // ["week", "rope", "tar"]
 */
export function wider(record: RecordLike, options: WiderOptions): DataFrame {
  checkCall("wider", arguments);
  return toFrame(widerTable(columnsOf(record), options));
}

/**
 * One row a series and period, from one column a series.
 *
 * @example longer({ week: [1], rope: [4], tar: [6] }, { keep: "week", names: "item", values: "sold" }).values // [[1, "rope", 4], [1, "tar", 6]]
 */
export function longer(record: RecordLike, options: LongerOptions): DataFrame {
  checkCall("longer", arguments);
  return toFrame(longerTable(columnsOf(record), options));
}
