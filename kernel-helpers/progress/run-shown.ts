import type { RunHooks } from "../../src/numeric/index.js";
import { withProgress } from "./with-progress.js";

/**
 * Runs a long computation with its progress shown; the caller's own `onProgress` is called as well. An interrupt of the
 * cell ends it at its next report.
 */
export function runShown<Options extends RunHooks, Result>(
  label: string,
  options: Options,
  run: (options: Options) => Result,
): Result {
  return withProgress(label, undefined, ({ at }) =>
    run({
      ...options,
      onProgress: (done, of) => {
        at(done, of);
        options.onProgress?.(done, of);
      },
    }),
  );
}
