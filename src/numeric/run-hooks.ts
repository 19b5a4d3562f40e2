import { interrupted } from "./refusals.js";

/** How a long computation tells how far it is, and how it is told to stop. */
export interface RunHooks {
  /** Called now and then with how much is done and of how much; what it returns is ignored. */
  readonly onProgress?: (done: number, of: number) => void;
  /** Signal of an AbortController that ends the run at its next report of progress; no result is kept. */
  readonly signal?: AbortSignal;
}

type Report = (done: number, of: number) => void;

/** Counts one more piece of work as done. */
export type Tick = () => void;

/** Counts the pieces of a work that is about so many; more of them move the end. */
export function ticker(hooks: RunHooks, about: number): Tick {
  const report = reporter(hooks);
  let done = 0;
  return () => {
    done++;
    report(done, Math.max(about, done));
  };
}

/**
 * A report that obeys the signal. An error thrown by `onProgress` ends the run as well, as it would in any function.
 *
 * @throws {ModelError} `interrupted`, from the report.
 */
export function reporter({ onProgress, signal }: RunHooks): Report {
  return (done, of) => {
    onProgress?.(done, of);
    if (signal?.aborted === true) throw interrupted(done, of, signal.reason);
  };
}
