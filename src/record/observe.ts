import { checkOptions } from "./check-options.js";
import { checkIdentities } from "./checks/check-identities.js";
import { checkValues } from "./checks/check-values.js";
import { refuseMixedUnits } from "./checks/refuse-mixed-units.js";
import { type ColumnTable, rowCount } from "./column-table.js";
import { decided } from "./decisions/correct.js";
import type { Decision } from "./decisions/decision.js";
import { type FindingLog, findingLog } from "./finding-log.js";
import type { ObservationOptions } from "./observation-options.js";
import type { Observations, ObservedGroup } from "./observations.js";
import { axisOfGroups } from "./period/axis-of-groups.js";
import { noteMonthEnds } from "./period/note-month-ends.js";
import { noteSteps } from "./period/note-steps.js";
import { type PlacedRows, placedRows } from "./period/placed-rows.js";
import { type ReadColumns, readColumns } from "./read-columns.js";
import { noDataRows, noUsableRows } from "./refusals.js";
import { chooseRows } from "./series/choose-rows.js";
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
 *   `where` and `rows`), used, flagged, corrected and refused (left out).
 * @throws {ModelError} `no-data-rows` | `no-rows-chosen` | `no-such-row` | `mixed-units` | `identity-unread` | `no-usable-rows` | `option-missing` | `option-unknown` | `option-wrong` | `missing-column` |
 *   `doubled-column` | `unit-unknown` | `not-a-number` | `decimal-sign-unclear` | `step-missing` | `no-period` |
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
  const log = findingLog();
  noteDecisions(table, log);
  const used = decided(table);
  const chosen = chooseRows(used, options.where, options.rows);
  const columns = readColumns(used, options, chosen.isRead);
  const periods = placedRows(used, options.period, options.step, chosen.isRead);
  const by = typeof options.by === "string" ? [options.by] : (options.by ?? []);
  const rows = groupRows(used, by, chosen.rows, log);
  refuseMixedUnits(used, rows);
  const groups = rows.map((group) => observedGroup(group, columns, periods, used, options, log));
  const kept = groups.flatMap(({ group }) => group ?? []);
  if (kept.length === 0) throw noUsableRows(chosen.count);
  noteSteps(
    kept,
    periods,
    columns.states.every(({ measured }) => measured === "flow"),
    log,
  );
  noteMonthEnds(kept, periods, log);
  if (options.identities)
    checkIdentities(
      used,
      options.identities,
      rows.map((group) => byPeriod(group.rows, periods)),
      log,
    );
  for (const group of kept) {
    for (const { name, column, unit, measured = "level" } of columns.states) {
      const state = { name, column, unit, measured };
      checkValues({ group, state, values: group.values[name]!, measured, period: periods.column, log });
    }
  }
  return assemble(kept, columns, periods, options, log, {
    aside: read - chosen.count,
    read: chosen.count,
    used: groups.reduce((sum, { used }) => sum + used, 0),
    corrections: table.decisions ?? [],
  });
}

/** Rows by increasing period; of one period in the record's order. */
function byPeriod(rows: Int32Array, { position }: PlacedRows): Int32Array {
  return rows.slice().sort((a, b) => position[a]! - position[b]! || a - b);
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

interface Counted {
  readonly aside: number;
  readonly read: number;
  readonly used: number;
  readonly corrections: readonly Decision[];
}

function assemble(
  groups: readonly ObservedGroup[],
  columns: ReadColumns,
  periods: PlacedRows,
  options: ObservationOptions,
  log: FindingLog,
  { aside, read, used, corrections }: Counted,
): Observations {
  const decisions = log.decisions();
  const corrected = new Set(decisions.map(({ row }) => row)).size;
  const settled = corrected - new Set(corrections.map(({ row }) => row)).size;
  const flows = columns.inputs.filter(({ measured }) => measured === "flow").map(({ name }) => name);
  return {
    kind: "observations",
    groups,
    ...(options.by !== undefined && { by: [options.by].flat() }),
    states: columns.states.map(({ name, column, unit, measured = "level" }) => ({
      name,
      column,
      unit,
      measured,
    })),
    inputs: columns.inputs.map(({ name }) => name),
    ...(flows.length > 0 && { flows }),
    axis: axisOfGroups(groups, periods),
    order: options.order ?? "",
    findings: log.all(),
    ...(decisions.length > 0 && { decisions }),
    counts: {
      ...(aside > 0 && { aside }),
      read,
      used,
      flagged: log.flagged(),
      corrected,
      ...(settled > 0 && { settled }),
      refused: read - used,
    },
  };
}
