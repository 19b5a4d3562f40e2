import { errorReport } from "./cells/traceback.js";
import { presentRun } from "./output/run.js";
import type { KernelState } from "./requests/kernel-state.js";

/**
 * An error that nobody caught, in work that a cell left behind, is told below that cell; the kernel lives on.
 */
export function surviveStrayErrors(kernel: KernelState): void {
  const tell = (cause: unknown): void => {
    const { traceback } = errorReport(cause, "", "", kernel.sources);
    const text = `Not caught, in work that a cell left running:\n${traceback.join("\n")}\n`;
    const run = presentRun();
    if (run === undefined) process.stderr.write(text);
    else if (!run.silent) run.output.print("stderr", text);
  };
  process.on("uncaughtException", tell);
  process.on("unhandledRejection", tell);
  // Node says of functions that this kernel relies on that they are experimental: nothing to tell a reader.
  process.removeAllListeners("warning");
  process.on("warning", (warning) => {
    if (warning.name !== "ExperimentalWarning") process.stderr.write(`${warning.name}: ${warning.message}\n`);
  });
  // A front end interrupts by message. The signal itself only ends synchronous code, which Node does by itself
  // while such code runs; at any other time it must not end the process.
  process.on("SIGINT", () => undefined);
}
