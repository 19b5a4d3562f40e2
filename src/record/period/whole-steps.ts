import type { FindingLog } from "../finding-log.js";
import { leeway, rounding } from "./period-axis.js";
import type { PlacedRows } from "./placed-rows.js";
import { offStep } from "./refusals.js";
import { unitText } from "./unit-text.js";

/**
 * Whole steps from the first row of a series to each of some rows.
 *
 * @throws {ModelError} `off-step` when a row lies more than a tenth of a step off, unless "nearest" was chosen.
 */
export function wholeSteps(
  rows: Int32Array,
  from: number,
  periods: PlacedRows,
  choice: "refuse" | "nearest",
  log: FindingLog,
): Int32Array {
  const { position } = periods;
  const first = position[from]!;
  const index = new Int32Array(rows.length);
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i]!;
    const steps = position[row]! - first;
    const whole = Math.round(steps);
    const off = Math.abs(steps - whole);
    if (off > leeway && choice === "refuse")
      throw offStep(row + 1, periods.column, periods.written(row), steps, stepText(periods));
    if (off > rounding) noteOffStep(row, steps - whole, periods, log);
    index[i] = whole;
  }
  return index;
}

export function stepText(periods: PlacedRows): string {
  const { every, of } = periods.calendar.step;
  return unitText(every, of);
}

function noteOffStep(row: number, off: number, periods: PlacedRows, log: FindingLog): void {
  const early = off < 0 ? "before" : "after";
  log.note({
    kind: "off-step",
    row: row + 1,
    column: periods.column,
    value: periods.written(row),
    message: `Row ${row + 1}: ${periods.column} ${periods.written(row)} lies ${Number(Math.abs(off).toPrecision(2))} of a step ${early} a whole step.`,
    done: "taken at the nearest whole step; its time kept as read",
  });
}
