import { checkCall } from "../options/index.js";
import { type Progress, progress } from "./progress.js";

/**
 * Runs a calculation that reports its progress, and ends the progress line in any case.
 *
 * @returns the return value of `work`; a promise if that is one.
 * @example withProgress("Sum", 3, ({ advance }) => { let sum = 0; for (const x of [1, 2, 3]) { sum += x; advance(); } return sum; }); // 6
 */
export function withProgress<T>(label: string, total: number | undefined, work: (shown: Progress) => T): T {
  checkCall("withProgress", arguments);
  const shown = progress(label, total);
  let pending = false;
  try {
    const result = work(shown);
    if (result instanceof Promise) {
      pending = true;
      return result.finally(shown.end) as T;
    }
    return result;
  } finally {
    if (!pending) shown.end();
  }
}
