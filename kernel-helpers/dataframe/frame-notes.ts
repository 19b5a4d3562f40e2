import type { DataFrame } from "danfojs-node";
import type { Decision } from "../../src/record/index.js";
import type { RecordSource } from "../../src/store/index.js";
import { checkCall } from "../options/index.js";

/** What is known of a frame besides its cells; kept beside it, so that no column or option is spent on it. */
export interface FrameNotes {
  /** Where the record was read from. */
  readonly source?: RecordSource;
  readonly decisions?: readonly Decision[];
  /** Columns of the record, where columns of corrected values stand behind them. */
  readonly raw?: number;
  /** Names of the record, where the frame could not carry them. */
  readonly names?: readonly string[];
}

const notes = new WeakMap<object, FrameNotes>();

export function noteFrame(frame: DataFrame, known: FrameNotes): void {
  notes.set(frame, known);
}

export function notesOf(frame: object): FrameNotes {
  return notes.get(frame) ?? {};
}

/**
 * The file that a frame was read from: path as written, checksum, bytes, rows, and what was found out about it.
 *
 * @returns undefined for a frame that was not read from a file, or was made from one that was.
 */
export function sourceOf(frame: DataFrame): RecordSource | undefined {
  checkCall("sourceOf", arguments);
  return notesOf(frame).source;
}
