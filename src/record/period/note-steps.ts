import type { FindingLog } from "../finding-log.js";
import type { ObservedGroup } from "../observations.js";
import { unitWithin } from "./calendar.js";
import type { PlacedRows } from "./placed-rows.js";
import { listText, unitText } from "./unit-text.js";
import { stepText } from "./whole-steps.js";

/** Notes gaps row by row, and once for the record which lengths of step occur besides the single one. */
export function noteSteps(
  groups: readonly ObservedGroup[],
  periods: PlacedRows,
  areFlows: boolean,
  log: FindingLog,
): void {
  const counts = countSteps(groups);
  const lengths = [...counts.keys()].sort((a, b) => a - b);
  const pairs = lengths.reduce((sum, steps) => sum + counts.get(steps)!, 0);
  const shared = pairs > 1 ? lengths.reduce(commonDivisor, 0) : 1;
  for (const group of groups) {
    noteGaps(group, Math.max(1, shared), periods, log);
    if (group.index.length === 1) noteSingle(group, periods, log);
  }
  if (periods.calendar.name === "4-4-5" && areFlows) noteUneven(periods, log);
  if (shared > 1) noteOddStep(shared, periods, log);
  else if (lengths.length > 0 && lengths[0]! > 1) noteShortStep(lengths[0]!, periods, log);
  else if (lengths.length > 1) noteMixed(lengths, counts, periods, log);
}

/** How many pairs of neighbouring rows span each number of steps. */
function countSteps(groups: readonly ObservedGroup[]): ReadonlyMap<number, number> {
  const counts = new Map<number, number>();
  for (const { index } of groups)
    for (let i = 1; i < index.length; i++) {
      const steps = index[i]! - index[i - 1]!;
      counts.set(steps, (counts.get(steps) ?? 0) + 1);
    }
  return counts;
}

function commonDivisor(a: number, b: number): number {
  return b === 0 ? a : commonDivisor(b, a % b);
}

/** Notes each pair of a series that spans more than the usual steps. */
function noteGaps(group: ObservedGroup, usual: number, periods: PlacedRows, log: FindingLog): void {
  for (let i = 1; i < group.index.length; i++) {
    const steps = group.index[i]! - group.index[i - 1]!;
    if (steps > usual) noteGap(group, i, steps, periods, log);
  }
}

function written(group: ObservedGroup, i: number): string {
  return group.labels?.[i] ?? String(group.time[i]!);
}

function noteGap(group: ObservedGroup, i: number, steps: number, periods: PlacedRows, log: FindingLog): void {
  const missing = steps === 2 ? "one period is missing" : `${steps - 1} periods are missing`;
  const where = group.name === "" ? "" : ` of "${group.name}"`;
  log.note({
    kind: "gap",
    row: group.rows[i]!,
    column: periods.column,
    value: written(group, i),
    message: `Row ${group.rows[i]}${where}: ${periods.column} ${written(group, i)} follows ${written(group, i - 1)}; ${missing}.`,
    done: `used as a ${steps}-step pair`,
  });
}

function noteSingle(group: ObservedGroup, periods: PlacedRows, log: FindingLog): void {
  log.note({
    kind: "single-row",
    row: group.rows[0],
    column: periods.column,
    value: written(group, 0),
    message: `${group.name === "" ? "The record" : `"${group.name}"`} has a single usable row: no change can be seen in it.`,
    done: "kept",
  });
}

function wholeRecord(
  kind: string,
  periods: PlacedRows,
  message: string,
  done: string,
  log: FindingLog,
): void {
  log.note({ kind, row: undefined, column: periods.column, value: "", message, done });
}

/** A step that no pair of rows spans once, and all span a multiple of it: it is probably stated in another unit. */
function noteOddStep(shared: number, periods: PlacedRows, log: FindingLog): void {
  const { every, of } = periods.calendar.step;
  const apart = Number((shared * every).toPrecision(12));
  const within = periods.moments === undefined ? unitWithin(of, shared) : undefined;
  const [times, whole] = [
    `${shared} steps of ${stepText(periods)}`,
    `step: { every: ${apart}, of: "${of}" }`,
  ];
  const remedy =
    within === undefined
      ? `If one step is what lies between two rows, write ${whole}.`
      : `If "${periods.column}" counts ${within}s, write step: { every: ${apart}, of: "${within}" }; if rows do lie ${unitText(apart, of)} apart, write ${whole}.`;
  wholeRecord(
    "step-at-odds",
    periods,
    `Every pair of rows spans ${times}, or a multiple of that: the step is probably not the one of the record. ${remedy}`,
    `used as ${shared}-step pairs`,
    log,
  );
}

function noteShortStep(shortest: number, periods: PlacedRows, log: FindingLog): void {
  const { every, of } = periods.calendar.step;
  wholeRecord(
    "no-single-step",
    periods,
    `No two rows lie one step (${stepText(periods)}) apart; the closest lie ${shortest} steps (${unitText(shortest * every, of)}) apart.`,
    "used as multi-step pairs",
    log,
  );
}

function noteMixed(
  lengths: readonly number[],
  counts: ReadonlyMap<number, number>,
  periods: PlacedRows,
  log: FindingLog,
): void {
  const { every, of } = periods.calendar.step;
  const most = 6;
  const more = lengths.length > most ? " and longer" : "";
  const occur = lengths.slice(0, most).map((steps) => Number((steps * every).toPrecision(12)));
  const told = lengths.slice(lengths[0] === 1 ? 1 : 0, most).map((steps) => {
    const pairs = counts.get(steps)!;
    return `${pairs} ${pairs === 1 ? "pair spans" : "pairs span"} ${steps} steps`;
  });
  wholeRecord(
    "mixed-steps",
    periods,
    `Steps of ${listText(occur)} ${unitText(2, of).slice(2)}${more} occur: the rule is applied per ${stepText(periods)}; ${listText(told)}.`,
    "longer ones used as multi-step pairs",
    log,
  );
}

/** (Common practice of retailers' calendars, no source.) */
function noteUneven(periods: PlacedRows, log: FindingLog): void {
  wholeRecord(
    "uneven-periods",
    periods,
    "Periods of a 4-4-5 calendar hold four, four and five weeks, and in some years one of six: flows compare only per week.",
    "kept as recorded",
    log,
  );
}
