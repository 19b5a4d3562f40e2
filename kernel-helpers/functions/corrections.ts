import type { DataFrame } from "danfojs-node";
import {
  type Correction,
  correct as correctTable,
  type Decision,
  type Observations,
  undo as undoLast,
} from "../../src/record/index.js";
import { attachNotes, columnsOf, frameNotes, type RecordLike, toFrame } from "../dataframe/index.js";
import { checkCall } from "../options/index.js";
import { bundleOf, showing } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { decisionSentence, decisionsTable } from "./decisions-table.js";

/**
 * Corrects one cell of a record, or leaves a row out. The raw column stays as it was read; beside it stands a
 * column of what is used instead, and `observations` uses that one. The decision is noted for the write-up.
 *
 * @returns a new frame; the one given is not changed.
 * @throws {ModelError} `no-such-row` | `missing-column` | `reason-missing`.
 * @example
 * const checked = correct(readings, { row: 4, column: "reading", now: null, why: "flask shaken", who: "A. K." });
 * checked.columns.at(-1) // "reading (corrected)"
 */
export function correct(record: RecordLike, correction: Correction): DataFrame {
  checkCall("correct", arguments);
  const corrected = correctTable(columnsOf(record), correction);
  caseLog.noteStep(`correction: ${decisionSentence(corrected.decisions!.at(-1)!)}`);
  return sameSource(record, toFrame(corrected));
}

/**
 * Takes back the last correction of a record, or the last one of a row.
 *
 * @throws {ModelError} `no-decision` when there is none.
 * @example undo(correct(readings, { row: 4, why: "flask shaken" })).columns.length // readings.columns.length
 */
export function undo(record: RecordLike, row?: number): DataFrame {
  checkCall("undo", arguments);
  const before = columnsOf(record);
  const after = undoLast(before, row);
  const taken = before.decisions!.find((decision) => !after.decisions?.includes(decision));
  if (taken) caseLog.noteStep(`correction taken back: ${decisionSentence(taken)}`);
  return sameSource(record, toFrame(after));
}

/** The corrections of a record, in the order in which they were made. */
export interface DecisionsLog {
  readonly kind: "decisions";
  readonly decisions: readonly Decision[];
}

/**
 * The decisions log of a record or of observations: row, column, what was read, what is used, why, and who.
 *
 * @example decisionsLog(correct(readings, { row: 4, why: "flask shaken" })).decisions.length // 1
 */
export function decisionsLog(record: RecordLike): DecisionsLog {
  checkCall("decisionsLog", arguments);
  const isObserved = (record as Partial<Observations>).kind === "observations";
  const { decisions = [] } = isObserved ? (record as Observations) : columnsOf(record as RecordLike);
  const made: DecisionsLog = { kind: "decisions", decisions };
  return showing(made, async () => (await bundleOf(decisionsTable(decisions))) ?? {});
}

function sameSource(record: RecordLike, frame: DataFrame): DataFrame {
  const { source } = frameNotes(record);
  if (source !== undefined) attachNotes(frame, { ...frameNotes(frame), source });
  return frame;
}
