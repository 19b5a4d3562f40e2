export type { CalendarName } from "./calendar.js";
export {
  type Column,
  type ColumnTable,
  columnNamed,
  isColumnTable,
  isEmpty,
  rowCount,
  tableOf,
} from "./column-table.js";
export type { Decision } from "./decision.js";
export type { DifferenceSeries } from "./difference-series.js";
export { type DifferenceOptions, type Differences, differences } from "./differences.js";
export type { Finding } from "./finding.js";
export type { CensoringLimits, DuplicateChoice, ObservationOptions } from "./observation-options.js";
export type {
  Observations,
  ObservedGroup,
  ObservedState,
  ReplicateSpread,
  StepLength,
} from "./observations.js";
export { observations } from "./observe.js";
export { packed, tableOfRows } from "./table-of-rows.js";
