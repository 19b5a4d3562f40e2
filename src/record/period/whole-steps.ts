import type { FindingLog } from "../finding-log.js";
import type { PeriodAxis } from "./period-axis.js";
import { offStep } from "./refusals.js";
import { unitText } from "./unit-text.js";

/** Off by less than this part of a step is a matter of rounding in the record, not of timing. */
const rounding = 1e-6;
/** Off by less than this part is a late or early reading of the step, taken as such and told. */
const leeway = 0.1;

/**
 * Whole steps from the first row of a series to each of its rows.
 *
 * @throws {ModelError} `off-step` when a row lies more than a tenth of a step off, unless "nearest" was chosen.
 */
export function wholeSteps(
  rows: Int32Array,
  axis: PeriodAxis,
  choice: "refuse" | "nearest",
  log: FindingLog,
): Int32Array {
  const { position } = axis;
  const first = position[rows[0]!]!;
  const index = new Int32Array(rows.length);
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i]!;
    const steps = position[row]! - first;
    const whole = Math.round(steps);
    const off = Math.abs(steps - whole);
    if (off > leeway && choice === "refuse")
      throw offStep(row + 1, axis.column, axis.written(row), steps, stepText(axis));
    if (off > rounding) noteOffStep(row, steps - whole, axis, log);
    index[i] = whole;
  }
  return index;
}

export function stepText(axis: PeriodAxis): string {
  const { every, of } = axis.calendar.step;
  return unitText(every, of);
}

function noteOffStep(row: number, off: number, axis: PeriodAxis, log: FindingLog): void {
  const early = off < 0 ? "before" : "after";
  log.note({
    kind: "off-step",
    row: row + 1,
    column: axis.column,
    value: axis.written(row),
    message: `Row ${row + 1}: ${axis.column} ${axis.written(row)} lies ${Number(Math.abs(off).toPrecision(2))} of a step ${early} a whole step.`,
    done: "taken at the nearest whole step; its time kept as read",
  });
}
