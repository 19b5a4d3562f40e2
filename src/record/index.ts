export {
  type Column,
  type ColumnTable,
  columnNamed,
  isColumnTable,
  isEmpty,
  rowCount,
  tableOf,
} from "./column-table.js";
export { type Correction, correct, decided, undo } from "./decisions/correct.js";
export type { Decision } from "./decisions/decision.js";
export type { DifferenceSeries } from "./differences/difference-series.js";
export { type DifferenceOptions, type Differences, differences } from "./differences/differences.js";
export type { Finding } from "./finding.js";
export type { CensoringLimits, DuplicateChoice, ObservationOptions } from "./observation-options.js";
export type {
  Observations,
  ObservedGroup,
  ObservedState,
  ReplicateVariation,
  StepLength,
} from "./observations.js";
export { observations } from "./observe.js";
export { packed } from "./packed.js";
export type { CalendarName } from "./period/calendar.js";
export {
  indexOf,
  labelAt,
  labelBetween,
  labelsAt,
  type PeriodAxis,
  periodsAfter,
  periodWords,
} from "./period/period-axis.js";
export { calendarAxis, numberAxis } from "./period/stated-axis.js";
export { inputByPeriod } from "./series/input-by-period.js";
export { joined } from "./series/joined.js";
export { tableOfRows } from "./table-of-rows.js";
export { type FillOptions, filled } from "./tables/filled.js";
export type { PeriodsOf } from "./tables/placed-series.js";
export { type ShiftOptions, shifted } from "./tables/shifted.js";
export type { Summary } from "./tables/summary-of.js";
export { type ToPeriodsOptions, toPeriods } from "./tables/to-periods.js";
export { type LongerOptions, longer, type WiderOptions, wider } from "./tables/wider.js";
export { type WindowOptions, windowed } from "./tables/windowed.js";
