import { frozenCopy, type RunHooks } from "../../src/numeric/index.js";
import { runShown } from "../progress/index.js";
import { caseLog } from "./case-log.js";

/** Runs a long computation with the seed of the case, unless one is given, and its progress shown. */
export function seededRun<Options extends RunHooks & { readonly seed?: number }, Result>(
  label: string,
  options: Options,
  run: (options: Options) => Result,
): Result {
  const own = frozenCopy(options);
  return runShown(label, { ...own, seed: own.seed ?? caseLog.seed() }, run);
}
