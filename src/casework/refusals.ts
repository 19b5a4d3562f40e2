import { KernelError } from "../kernel/index.js";

export function unreadableNotebook(path: string, cause: unknown): KernelError {
  return new KernelError(
    "unreadable-notebook",
    `"${path}" could not be read as a notebook. Pass the path of an .ipynb file of notebook format 4.`,
    { path },
    cause,
  );
}

export function kernelEnded(detail: string): KernelError {
  return new KernelError(
    "kernel-ended",
    `The kernel ended while it was still needed${detail === "" ? "" : `; its last words were:\n${detail.trimEnd()}`}\n` +
      "Run it again; if it ends again, run the cells one by one in a front end to see which one ends it.",
    { detail },
  );
}

export function kernelSilent(seconds: number): KernelError {
  return new KernelError(
    "kernel-silent",
    `The kernel did not answer within ${seconds} seconds. Check that this machine is not overloaded and that ` +
      "connections to 127.0.0.1 are allowed, then run it again.",
    { seconds },
  );
}

export function unknownSetting(name: string, path: string, known: readonly string[]): KernelError {
  const offer = known.length > 0 ? `Names that can be set: ${known.join(", ")}.` : "It has none.";
  return new KernelError(
    "unknown-setting",
    `"${path}" has no top-level \`const ${name} = ...\` or \`let ${name} = ...\` to set. ${offer}`,
    { name, path, known },
  );
}

export function foreignSpecification(folder: string): KernelError {
  return new KernelError(
    "foreign-specification",
    `The folder "${folder}" was not made by "periodwise install", so it is left as it is. ` +
      "Remove it yourself if it is no longer wanted.",
    { folder },
  );
}
