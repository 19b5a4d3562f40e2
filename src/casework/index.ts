export type { KernelCommand } from "./client/kernel-process.js";
export { dataFolder, installSpecification, removeSpecification } from "./kernel-specification.js";
export { type NotebookRun, type RunOptions, runNotebook } from "./run-notebook.js";
