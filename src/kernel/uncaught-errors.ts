import { errorReport } from "./cells/traceback.js";
import { currentRun } from "./output/run.js";
import type { KernelState } from "./requests/kernel-state.js";

/**
 * Reports uncaught errors of work that a cell left running below that cell; the kernel keeps running.
 */
export function reportUncaughtErrors(kernel: KernelState): void {
  const report = (cause: unknown): void => {
    const { traceback } = errorReport(cause, "", "", kernel.sources);
    const text = `Uncaught error in work that a cell left running:\n${traceback.join("\n")}\n`;
    const run = currentRun();
    if (run === undefined) process.stderr.write(text);
    else if (!run.silent) run.output.print("stderr", text);
  };
  process.on("uncaughtException", report);
  process.on("unhandledRejection", report);
  // Node warns that functions used by this kernel are experimental, which does not concern the user.
  process.removeAllListeners("warning");
  process.on("warning", (warning) => {
    if (warning.name !== "ExperimentalWarning") process.stderr.write(`${warning.name}: ${warning.message}\n`);
  });
  // A front end interrupts by message. The signal only stops synchronous code, which Node does while such code runs;
  // at any other time it must not end the process.
  process.on("SIGINT", () => undefined);
}
