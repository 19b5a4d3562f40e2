import type ts from "typescript-cell";
import type { Message } from "../protocol/message.js";
import type { KernelState } from "./kernel-state.js";

const indentation = "  ";
/** Makes the parser read the text as a module, in which `await` may stand at the top. */
const modulePrefix = "export {};";

/** @see Jupyter messaging, "Code completeness". */
export function isComplete(kernel: KernelState, request: Message): object {
  const text = String(request.content["code"] ?? "");
  return completeness(kernel.session().compiler.library, text);
}

/** A text whose first error is at its end is incomplete; one with an earlier error is invalid. */
function completeness(library: typeof ts, text: string): object {
  const file = library.createSourceFile("cell.ts", modulePrefix + text, library.ScriptTarget.ES2022);
  // Every parsed file has this list; the compiler's declarations omit it.
  const [first] = Reflect.get(file, "parseDiagnostics") as readonly ts.DiagnosticWithLocation[];
  if (first === undefined) return { status: "complete" };
  const end = modulePrefix.length + text.trimEnd().length;
  return first.start >= end ? { status: "incomplete", indent: indentAfter(text) } : { status: "invalid" };
}

/** The indentation of the last line, increased when it opens a bracket. */
function indentAfter(text: string): string {
  const last = text.trimEnd().split("\n").at(-1) ?? "";
  const own = /^\s*/.exec(last)?.[0] ?? "";
  return /[{([]\s*$/.test(last) ? own + indentation : own;
}
