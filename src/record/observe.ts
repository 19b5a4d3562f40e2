import { checkIdentities } from "./checks/check-identities.js";
import { checkValues } from "./checks/check-values.js";
import { refuseMixedUnits } from "./checks/refuse-mixed-units.js";
import { type ColumnTable, columnNamed, rowCount } from "./column-table.js";
import { type FindingLog, findingLog } from "./finding-log.js";
import { groupRows } from "./group-rows.js";
import { noteSteps } from "./note-steps.js";
import type { ObservationOptions } from "./observation-options.js";
import type { Observations, ObservedGroup } from "./observations.js";
import { observedGroup } from "./observed-group.js";
import { type PeriodAxis, periodAxis } from "./period-axis.js";
import { inputsOf, readColumns } from "./read-columns.js";
import { noDataRows, noUsableRows, optionMissing } from "./refusals.js";

/**
 * Makes a record ready for rules: values by whole steps for each series, with all that was found on the way.
 *
 * Nothing is altered silently. An empty cell is missing, not zero, and its row is left out; a gap stays a gap,
 * so that the pair across it is a multi-step one; rows out of order, doubled periods and text among numbers
 * are refused until the options say what to do.
 *
 * @param table - the record as columns of equal length, m rows.
 * @param options - which columns hold what, and the length of one step; see {@link ObservationOptions}.
 * @returns groups in the order of their first rows, findings, and counts of rows read, used, flagged,
 *   corrected and refused.
 * @throws {ModelError} `no-data-rows` | `mixed-units` | `identity-unread` | `no-usable-rows` | `option-missing` | `option-wrong` | `missing-column` |
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
  if (options?.period === undefined)
    throw optionMissing("period", 'Name the period column: period: "month".');
  const log = findingLog();
  const columns = readColumns(table, options);
  const axis = periodAxis(table, options.period, options.step);
  const by = typeof options.by === "string" ? [options.by] : (options.by ?? []);
  const rows = groupRows(table, by, rowsWhere(table, options.where, read), log);
  refuseMixedUnits(table, rows);
  const groups = rows.map((group) => observedGroup(group, columns, axis, table, options, log));
  const kept = groups.filter(({ group }) => group.index.length > 0).map(({ group }) => group);
  if (kept.length === 0) throw noUsableRows(read);
  noteSteps(kept, axis, log);
  if (options.identities !== undefined)
    checkIdentities(
      table,
      options.identities,
      rows.map((group) => byPeriod(group.rows, axis)),
      log,
    );
  const { measured = "level" } = options;
  for (const group of kept) {
    for (const state of columns.states)
      checkValues({ group, state, values: group.values[state.name]!, measured, period: axis.column, log });
  }
  return assemble(
    kept,
    columns.states,
    axis,
    options,
    log,
    read,
    groups.reduce((n, g) => n + g.merged, 0),
  );
}

/** Rows by increasing period; of one period in the record's order. */
function byPeriod(rows: Int32Array, { position }: PeriodAxis): Int32Array {
  return rows.slice().sort((a, b) => position[a]! - position[b]! || a - b);
}

function rowsWhere(table: ColumnTable, where: ObservationOptions["where"], read: number): Int32Array {
  const all = Int32Array.from({ length: read }, (_, row) => row);
  if (where === undefined) return all;
  const wanted = Object.entries(where).map(([name, cell]) => ({
    column: columnNamed(table, name, "a condition"),
    cell: String(cell),
  }));
  return all.filter((row) => wanted.every(({ column, cell }) => String(column[row]) === cell));
}

function assemble(
  groups: readonly ObservedGroup[],
  states: Observations["states"],
  axis: PeriodAxis,
  options: ObservationOptions,
  log: FindingLog,
  read: number,
  merged: number,
): Observations {
  const used = groups.reduce((sum, group) => sum + group.rows.length, 0);
  const { step, name } = axis.calendar;
  return Object.freeze({
    kind: "observations",
    groups: Object.freeze(groups),
    ...(options.by !== undefined && { by: Object.freeze([options.by].flat()) }),
    states: Object.freeze(states.map((state) => Object.freeze(state))),
    inputs: Object.freeze(inputsOf(options).map(([input]) => input)),
    period: Object.freeze({ column: axis.column, unit: step.of, step, ...(name && { calendar: name }) }),
    measured: options.measured ?? "level",
    order: options.order ?? "",
    findings: log.all(),
    counts: Object.freeze({
      read,
      used,
      flagged: log.flagged(),
      corrected: merged,
      refused: read - used - merged,
    }),
  });
}
