import type { DataFrame } from "danfojs-node";
import type { Decision } from "../../src/record/index.js";
import type { RecordSource } from "../../src/store/index.js";
import { checkCall } from "../options/index.js";

/** Metadata of a frame, stored beside it. */
export interface FrameNotes {
  /** Source of the record. */
  readonly source?: RecordSource;
  readonly decisions?: readonly Decision[];
  /** Number of columns of the record, when columns of corrected values follow them. */
  readonly raw?: number;
  /** Column names of the record, when the frame could not take them. */
  readonly names?: readonly string[];
}

const notes = new WeakMap<object, FrameNotes>();

export function attachNotes(frame: DataFrame, known: FrameNotes): void {
  notes.set(frame, known);
}

export function frameNotes(frame: object): FrameNotes {
  return notes.get(frame) ?? {};
}

/**
 * The file that a frame was read from: path, checksum, bytes, rows, and notes about how it was read.
 *
 * @returns undefined for a frame that was not read from a file, or was derived from another frame.
 */
export function sourceOf(frame: DataFrame): RecordSource | undefined {
  checkCall("sourceOf", arguments);
  return frameNotes(frame).source;
}
