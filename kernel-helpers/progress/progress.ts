import { checkCall } from "../options/index.js";
import { interruptedError } from "./errors.js";
import { finalLine, type ProgressState, progressLine } from "./progress-line.js";
import { currentOutput, type ProgressOutput } from "./progress-output.js";

/** Progress of a calculation. */
export interface Progress {
  readonly kind: "progress";
  /** Sets the amount done, and the total if it is now known. */
  readonly at: (done: number, of?: number) => void;
  /** Adds to the amount done; default 1. */
  readonly advance: (by?: number) => void;
  /** Ends the line and returns the final text. Short work leaves no line. */
  readonly end: () => string;
}

/** Seconds before anything is shown, between two updates, and before the final line is kept. */
const showAfter = 1;
const updateEvery = 0.2;
const keepAfter = 5;

/**
 * Shows the progress of a long calculation: amount done, total, speed and time left. A notebook display or a terminal
 * line is updated in place; it ends as a final line, or disappears when the work took less than five seconds.
 *
 * An interrupt of the cell takes effect at the next `at` or `advance`.
 *
 * @param total - the total amount; undefined when unknown.
 * @throws {ModelError} `interrupted`, from `at` and `advance`.
 * @example progress("Resamples", 200).kind; // "progress"
 */
export function progress(label: string, total?: number): Progress {
  checkCall("progress", arguments);
  return progressAt(currentOutput(), label, total);
}

/** Progress on a given output. */
export function progressAt(output: ProgressOutput, label: string, total?: number): Progress {
  const began = output.now();
  let done = 0;
  let all = total;
  let shownAt = Number.NEGATIVE_INFINITY;
  let record: string | undefined;
  const state = (): ProgressState => ({
    label,
    done,
    total: all,
    seconds: Math.max(1e-3, output.now() - began),
  });
  const end = (stopped: boolean): string => {
    if (record !== undefined) return record;
    record = finalLine(state(), stopped);
    const kept = stopped || state().seconds >= keepAfter;
    if (shownAt > Number.NEGATIVE_INFINITY || stopped) output.show(kept ? record : "", undefined, true);
    return record;
  };
  const at = (now: number, of: number | undefined = all): void => {
    done = now;
    all = of;
    if (output.interrupted()) throw interruptedError(end(true));
    const { seconds } = state();
    if (record !== undefined || seconds < showAfter || seconds - shownAt < updateEvery) return;
    shownAt = seconds;
    output.show(progressLine(state()), all === undefined ? undefined : done / all, false);
  };
  return Object.freeze({
    kind: "progress",
    at,
    advance: (by = 1) => at(done + by),
    end: () => end(false),
  });
}
