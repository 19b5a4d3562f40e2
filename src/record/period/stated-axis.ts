import { tableOf } from "../column-table.js";
import type { StepLength } from "../observations.js";
import { axisOfRows } from "./axis-of-rows.js";
import type { CalendarName } from "./calendar.js";
import type { PeriodAxis } from "./period-axis.js";
import { placedRows } from "./placed-rows.js";

/** An axis of numbers, for periods that are counted and not dated; `period` is what one of them is called. */
export function numberAxis(origin: number, period: string | StepLength): PeriodAxis {
  const step = typeof period === "string" ? { every: 1, of: period } : period;
  const { every, of } = step;
  return {
    kind: "period-axis",
    column: of,
    unit: of,
    step,
    form: "number",
    counts: "numbers",
    origin,
    stride: every,
  };
}

/**
 * The axis of periods from a first one on that is named by its label, as a period column of a record may hold it.
 *
 * @throws {ModelError} as for the period column and the step of a record.
 */
export function calendarAxis(label: string, period: string | StepLength): PeriodAxis {
  const placed = placedRows(tableOf({ startsAt: [label] }), "startsAt", period as CalendarName | StepLength);
  const one = Int32Array.of(0);
  return { ...axisOfRows(placed, { rows: one, index: one }), column: placed.calendar.step.of };
}
