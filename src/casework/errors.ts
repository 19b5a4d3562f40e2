import { KernelError } from "../kernel/index.js";

export function unreadableNotebookError(path: string, cause: unknown): KernelError {
  const isMissing = (cause as NodeJS.ErrnoException).code === "ENOENT";
  const problem = isMissing ? `Notebook "${path}" not found.` : `Cannot read "${path}" as a notebook.`;
  return new KernelError(
    "unreadable-notebook",
    `${problem} Give the path of an .ipynb file (notebook format 4).`,
    { path },
    cause,
  );
}

export function kernelEndedError(detail: string): KernelError {
  return new KernelError(
    "kernel-ended",
    `The kernel ended unexpectedly.${detail === "" ? "" : ` Its last output was:\n${detail.trimEnd()}`}\n` +
      "Run the notebook again. If the kernel ends again, run the cells one by one in a front end to find the cause.",
    { detail },
  );
}

export function kernelSilentError(seconds: number): KernelError {
  return new KernelError(
    "kernel-silent",
    `The kernel did not answer within ${seconds} seconds. Check that the machine is not overloaded and that ` +
      "connections to 127.0.0.1 are allowed, then run the notebook again.",
    { seconds },
  );
}

export function unknownSettingError(name: string, path: string, known: readonly string[]): KernelError {
  const others =
    known.length > 0 ? `Names that can be set: ${known.join(", ")}.` : "It has no names that can be set.";
  return new KernelError(
    "unknown-setting",
    `"${path}" has no top-level \`const ${name} = ...\` or \`let ${name} = ...\`. ${others}`,
    { name, path, known },
  );
}

export function foreignSpecificationError(folder: string): KernelError {
  return new KernelError(
    "foreign-specification",
    `The folder "${folder}" was not created by "periodwise install" and is left unchanged. ` +
      "Remove it yourself if it is no longer needed.",
    { folder },
  );
}
