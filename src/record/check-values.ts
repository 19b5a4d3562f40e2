import type { FindingLog } from "./finding-log.js";
import type { ObservationOptions } from "./observation-options.js";
import type { ObservedGroup, ObservedState } from "./observations.js";
import type { PeriodAxis } from "./period-axis.js";

/** Looks at the values of one series for what a careful analyst would see. Nothing is altered. */
export function checkValues(
  group: ObservedGroup,
  states: readonly ObservedState[],
  _axis: PeriodAxis,
  _options: ObservationOptions,
  log: FindingLog,
): void {
  for (const state of states) noteConstant(group, state, log);
}

function noteConstant(group: ObservedGroup, state: ObservedState, log: FindingLog): void {
  const values = group.values[state.name]!;
  if (values.length < 2 || values.some((value) => value !== values[0])) return;
  const where = group.name === "" ? "" : ` in "${group.name}"`;
  log.note({
    kind: "never-changes",
    row: undefined,
    column: state.column,
    value: String(values[0]),
    message: `The value of ${state.column}${where} never changes: multiplier 1 cannot be separated from no process.`,
    done: "kept",
  });
}
