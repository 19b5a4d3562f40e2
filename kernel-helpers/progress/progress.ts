import { checkCall } from "../options/index.js";
import { progressLine, progressRecord, type Standing } from "./progress-line.js";
import { type ProgressPlace, presentPlace } from "./progress-place.js";
import { refuseInterrupted } from "./refusals.js";

/** A piece of work that says how far it is. */
export interface Progress {
  readonly kind: "progress";
  /** Says how much is done, and of how much when that has become known. */
  readonly at: (done: number, of?: number) => void;
  /** Says that so much more is done; default 1. */
  readonly advance: (by?: number) => void;
  /** Ends the line as a record of what was done, and gives that record. Short work leaves nothing. */
  readonly end: () => string;
}

/** Seconds of work before anything is shown, between two showings, and before a record is worth keeping. */
const patience = 1;
const pace = 0.2;
const memorable = 5;

/**
 * Shows how far a long piece of work is: what, how much of how much, how fast, and the time left. In a notebook one
 * display is updated in place, in a terminal one line; both end as a plain record, or as nothing when the work took
 * less than five seconds.
 *
 * An interrupt of the cell is obeyed at the next `at` or `advance`.
 *
 * @param total - how much there is to do; undefined when unknown.
 * @throws {ModelError} `interrupted`, from `at` and `advance`.
 * @example progress("Refits", 200).kind; // "progress"
 */
export function progress(label: string, total?: number): Progress {
  checkCall("progress", arguments);
  return progressAt(presentPlace(), label, total);
}

/** Progress shown at a given place. */
export function progressAt(place: ProgressPlace, label: string, total?: number): Progress {
  const began = place.now();
  let done = 0;
  let all = total;
  let shownAt = Number.NEGATIVE_INFINITY;
  let record: string | undefined;
  const standing = (): Standing => ({
    label,
    done,
    total: all,
    seconds: Math.max(1e-3, place.now() - began),
  });
  const end = (stopped: boolean): string => {
    if (record !== undefined) return record;
    record = progressRecord(standing(), stopped);
    const kept = stopped || standing().seconds >= memorable;
    if (shownAt > Number.NEGATIVE_INFINITY || stopped) place.show(kept ? record : "", undefined, true);
    return record;
  };
  const at = (now: number, of: number | undefined = all): void => {
    done = now;
    all = of;
    if (place.interrupted()) throw refuseInterrupted(end(true));
    const { seconds } = standing();
    if (record !== undefined || seconds < patience || seconds - shownAt < pace) return;
    shownAt = seconds;
    place.show(progressLine(standing()), all === undefined ? undefined : done / all, false);
  };
  return Object.freeze({
    kind: "progress",
    at,
    advance: (by = 1) => at(done + by),
    end: () => end(false),
  });
}
