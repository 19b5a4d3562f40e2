import type { FindingLog } from "../finding-log.js";
import type { ObservedGroup } from "../observations.js";
import type { PeriodAxis } from "./period-axis.js";
import { listText, unitText } from "./unit-text.js";
import { stepText } from "./whole-steps.js";

/** Notes gaps row by row, and once for the record which lengths of step occur besides the single one. */
export function noteSteps(
  groups: readonly ObservedGroup[],
  axis: PeriodAxis,
  measured: "level" | "flow",
  log: FindingLog,
): void {
  const counts = new Map<number, number>();
  for (const group of groups) {
    noteGaps(group, counts, axis, log);
    if (group.index.length === 1) noteSingle(group, axis, log);
  }
  if (axis.calendar.name === "4-4-5" && measured === "flow") noteUneven(axis, log);
  const lengths = [...counts.keys()].sort((a, b) => a - b);
  if (lengths.length > 0 && lengths[0]! > 1) noteShortStep(lengths[0]!, axis, log);
  else if (lengths.length > 1) noteMixed(lengths, counts, axis, log);
}

/** Counts the steps of a series by their length, and notes each that is longer than one. */
function noteGaps(
  group: ObservedGroup,
  counts: Map<number, number>,
  axis: PeriodAxis,
  log: FindingLog,
): void {
  let single = 0;
  for (let i = 1; i < group.index.length; i++) {
    const steps = group.index[i]! - group.index[i - 1]!;
    if (steps === 1) single++;
    else {
      counts.set(steps, (counts.get(steps) ?? 0) + 1);
      noteGap(group, i, steps, axis, log);
    }
  }
  if (single > 0) counts.set(1, (counts.get(1) ?? 0) + single);
}

function written(group: ObservedGroup, i: number): string {
  return group.labels?.[i] ?? String(group.time[i]!);
}

function noteGap(group: ObservedGroup, i: number, steps: number, axis: PeriodAxis, log: FindingLog): void {
  const missing = steps === 2 ? "one period is missing" : `${steps - 1} periods are missing`;
  const where = group.name === "" ? "" : ` of "${group.name}"`;
  log.note({
    kind: "gap",
    row: group.rows[i]!,
    column: axis.column,
    value: written(group, i),
    message: `Row ${group.rows[i]}${where}: ${axis.column} ${written(group, i)} follows ${written(group, i - 1)}; ${missing}.`,
    done: `used as a ${steps}-step pair`,
  });
}

function noteSingle(group: ObservedGroup, axis: PeriodAxis, log: FindingLog): void {
  log.note({
    kind: "single-row",
    row: group.rows[0],
    column: axis.column,
    value: written(group, 0),
    message: `${group.name === "" ? "The record" : `"${group.name}"`} has a single usable row: no change can be seen in it.`,
    done: "kept",
  });
}

function wholeRecord(kind: string, axis: PeriodAxis, message: string, done: string, log: FindingLog): void {
  log.note({ kind, row: undefined, column: axis.column, value: "", message, done });
}

function noteShortStep(shortest: number, axis: PeriodAxis, log: FindingLog): void {
  const { every, of } = axis.calendar.step;
  wholeRecord(
    "no-single-step",
    axis,
    `No two rows lie one step (${stepText(axis)}) apart; the closest lie ${shortest} steps (${unitText(shortest * every, of)}) apart.`,
    "used as multi-step pairs",
    log,
  );
}

function noteMixed(
  lengths: readonly number[],
  counts: ReadonlyMap<number, number>,
  axis: PeriodAxis,
  log: FindingLog,
): void {
  const { every, of } = axis.calendar.step;
  const most = 6;
  const more = lengths.length > most ? " and longer" : "";
  const occur = lengths.slice(0, most).map((steps) => Number((steps * every).toPrecision(12)));
  const told = lengths.slice(lengths[0] === 1 ? 1 : 0, most).map((steps) => {
    const pairs = counts.get(steps)!;
    return `${pairs} ${pairs === 1 ? "pair spans" : "pairs span"} ${steps} steps`;
  });
  wholeRecord(
    "mixed-steps",
    axis,
    `Steps of ${listText(occur)} ${unitText(2, of).slice(2)}${more} occur: the rule is applied per ${stepText(axis)}; ${listText(told)}.`,
    "longer ones used as multi-step pairs",
    log,
  );
}

/** (Common practice of retailers' calendars, no source.) */
function noteUneven(axis: PeriodAxis, log: FindingLog): void {
  wholeRecord(
    "uneven-periods",
    axis,
    "Periods of a 4-4-5 calendar hold four, four and five weeks, and in some years one of six: flows compare only per week.",
    "kept as recorded",
    log,
  );
}
