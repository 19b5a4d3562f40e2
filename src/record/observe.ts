import { checkOptions } from "./check-options.js";
import { checkIdentities } from "./checks/check-identities.js";
import { checkValues } from "./checks/check-values.js";
import { refuseMixedUnits } from "./checks/refuse-mixed-units.js";
import { type ColumnTable, columnNamed, rowCount } from "./column-table.js";
import { decided, rowsLeftOut } from "./decisions/correct.js";
import type { Decision } from "./decisions/decision.js";
import { type FindingLog, findingLog } from "./finding-log.js";
import type { ObservationOptions } from "./observation-options.js";
import type { Observations, ObservedGroup } from "./observations.js";
import { noteMonthEnds } from "./period/note-month-ends.js";
import { noteSteps } from "./period/note-steps.js";
import { type PeriodAxis, periodAxis } from "./period/period-axis.js";
import { inputsOf, readColumns } from "./read-columns.js";
import { noDataRows, noUsableRows } from "./refusals.js";
import { groupRows } from "./series/group-rows.js";
import { observedGroup } from "./series/observed-group.js";

/**
 * Makes a record ready for rules: values by whole steps for each series, with all that was found on the way.
 *
 * Nothing is altered silently. An empty cell is missing, not zero, and its row is left out; a gap stays a gap,
 * so that the pair across it is a multi-step one; rows out of order, doubled periods and text among numbers
 * are refused until the options say what to do.
 *
 * @param table - the record as columns of equal length, m rows.
 * @param options - which columns hold what, and the length of one step; see {@link ObservationOptions}.
 * @returns groups in the order of their first rows, findings, and counts of rows: read (those that meet
 *   `where`), used, flagged, corrected and refused (left out).
 * @throws {ModelError} `no-data-rows` | `mixed-units` | `identity-unread` | `no-usable-rows` | `option-missing` | `option-unknown` | `option-wrong` | `missing-column` |
 *   `doubled-column` | `not-a-number` | `decimal-sign-unclear` | `step-missing` | `no-period` |
 *   `ambiguous-date` | `no-such-period` | `off-step` | `not-increasing` | `duplicate-period`.
 * @example
 * const table = tableOf({ hours: [0, 12, 36], density: [2, 3.1, 7.4] });
 * const counts = observations(table, { period: "hours", step: { every: 12, of: "hour" }, value: "density" });
 * // counts.groups[0].index is [0, 1, 3]
 */
export function observations(table: ColumnTable, options: ObservationOptions): Observations {
  const read = rowCount(table);
  if (read === 0) throw noDataRows();
  checkOptions(options);
  const { identities, measured = "level" } = options;
  const log = findingLog();
  noteDecisions(table, log);
  const used = decided(table);
  const columns = readColumns(used, options);
  const axis = periodAxis(used, options.period, options.step);
  const by = typeof options.by === "string" ? [options.by] : (options.by ?? []);
  const taken = rowsWhere(used, options.where);
  const out = rowsLeftOut(used);
  const rows = groupRows(used, by, out.size === 0 ? taken : taken.filter((row) => !out.has(row)), log);
  refuseMixedUnits(used, rows);
  const groups = rows.map((group) => observedGroup(group, columns, axis, used, options, log));
  const kept = groups.filter(({ group }) => group.index.length > 0).map(({ group }) => group);
  if (kept.length === 0) throw noUsableRows(taken.length);
  noteSteps(kept, axis, measured, log);
  noteMonthEnds(kept, axis, log);
  if (identities)
    checkIdentities(
      used,
      identities,
      rows.map((group) => byPeriod(group.rows, axis)),
      log,
    );
  for (const group of kept) {
    for (const state of columns.states)
      checkValues({ group, state, values: group.values[state.name]!, measured, period: axis.column, log });
  }
  const standing = groups.reduce((sum, { used }) => sum + used, 0);
  return assemble(kept, columns.states, axis, options, log, {
    read: taken.length,
    used: standing,
    corrections: table.decisions ?? [],
  });
}

/** Rows by increasing period; of one period in the record's order. */
function byPeriod(rows: Int32Array, { position }: PeriodAxis): Int32Array {
  return rows.slice().sort((a, b) => position[a]! - position[b]! || a - b);
}

function rowsWhere(table: ColumnTable, where: ObservationOptions["where"] = {}): Int32Array {
  const all = new Int32Array(rowCount(table));
  for (let row = 0; row < all.length; row++) all[row] = row;
  const wanted = Object.entries(where).map(([name, cell]) => ({
    column: columnNamed(table, name, "a condition"),
    cell: String(cell),
  }));
  if (wanted.length === 0) return all;
  return all.filter((row) => wanted.every(({ column, cell }) => String(column[row]) === cell));
}

function noteDecisions({ decisions = [] }: ColumnTable, log: FindingLog): void {
  for (const decision of decisions) {
    const { row, column, was, now, why, who } = decision;
    const used =
      now === null
        ? `${was ?? "an empty cell"} is not used`
        : `${now} is used instead of ${was ?? "an empty cell"}`;
    const what = column === "" ? `Row ${row} is left out` : `Row ${row}, ${column}: ${used}`;
    const by = who === "" ? "" : ` (${who})`;
    log.note({
      kind: "corrected",
      row,
      column,
      value: String(was ?? ""),
      message: `${what}: ${why}${by}.`,
      done: "as decided",
    });
    log.decide(decision);
  }
}

function assemble(
  groups: readonly ObservedGroup[],
  states: Observations["states"],
  axis: PeriodAxis,
  options: ObservationOptions,
  log: FindingLog,
  {
    read,
    used,
    corrections,
  }: { readonly read: number; readonly used: number; readonly corrections: readonly Decision[] },
): Observations {
  const { step, name } = axis.calendar;
  const decisions = log.decisions();
  const corrected = new Set(decisions.map(({ row }) => row)).size;
  const settled = corrected - new Set(corrections.map(({ row }) => row)).size;
  return {
    kind: "observations",
    groups,
    ...(options.by !== undefined && { by: [options.by].flat() }),
    states,
    inputs: inputsOf(options).map(([input]) => input),
    period: { column: axis.column, unit: step.of, step, ...(name && { calendar: name }) },
    measured: options.measured ?? "level",
    order: options.order ?? "",
    findings: log.all(),
    ...(decisions.length > 0 && { decisions }),
    counts: {
      read,
      used,
      flagged: log.flagged(),
      corrected,
      ...(settled > 0 && { settled }),
      refused: read - used,
    },
  };
}
