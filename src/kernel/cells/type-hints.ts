import type ts from "typescript-cell";
import { adviceFor, withoutProjectSettings } from "./project-advice.js";
import { choicesOf, fieldsOf, missingArgument } from "./type-choices.js";

/** Compiler error codes, by the information that their messages lack. */
const unknownProperty = [2353, 2561];
const missingProperty = [2739, 2740, 2741];
const wrongValue = [2322, 2345, 2820];
const fewArguments = [2554, 2555];

/**
 * Adds to the compiler's messages what to write instead: the available properties, the allowed values, the missing
 * argument, the package to install.
 */
export function withHints(
  library: typeof ts,
  program: ts.Program,
  diagnostics: readonly ts.Diagnostic[],
): readonly ts.Diagnostic[] {
  return diagnostics.map((diagnostic) => {
    const plain = { ...diagnostic, messageText: withoutProjectSettings(diagnostic.messageText) };
    const hint = adviceFor(plain) ?? hintFor(library, program.getTypeChecker(), plain);
    return hint === undefined ? plain : { ...plain, messageText: extended(plain, hint) };
  });
}

function hintFor(library: typeof ts, checker: ts.TypeChecker, diagnostic: ts.Diagnostic): string | undefined {
  const { file, start, length } = diagnostic;
  if (file === undefined || start === undefined || length === undefined) return undefined;
  const node = deepestNode(library, file, start, start + length);
  const codes = codesOf(diagnostic);
  const has = (wanted: readonly number[]): boolean => wanted.some((code) => codes.includes(code));
  if (has(fewArguments)) return missingArgument(library, checker, node);
  const property = library.isObjectLiteralElementLike(node) ? node : node.parent;
  if (has(unknownProperty) && library.isObjectLiteralExpression(property.parent)) {
    return fieldsOf(library, checker, property.parent, property.getText(file).replace(/:.*/s, ""));
  }
  const value = library.isPropertyAssignment(property) ? property.initializer : (node as ts.Expression);
  if (has(missingProperty)) return fieldsOf(library, checker, value);
  return has(wrongValue) ? choicesOf(checker, value) : undefined;
}

/** The innermost node that spans the range. */
function deepestNode(library: typeof ts, file: ts.SourceFile, start: number, end: number): ts.Node {
  let found: ts.Node = file;
  const visit = (node: ts.Node): void => {
    if (node.getStart(file) > start || node.end < end) return;
    found = node;
    library.forEachChild(node, visit);
  };
  library.forEachChild(file, visit);
  return found;
}

function codesOf({ code, messageText }: ts.Diagnostic): readonly number[] {
  const codes = [code];
  const visit = (chain: ts.DiagnosticMessageChain): void => {
    codes.push(chain.code);
    for (const next of chain.next ?? []) visit(next);
  };
  if (typeof messageText !== "string") visit(messageText);
  return codes;
}

function extended({ messageText, category, code }: ts.Diagnostic, hint: string): ts.DiagnosticMessageChain {
  const chain = typeof messageText === "string" ? { messageText, category, code } : messageText;
  return { ...chain, next: [...(chain.next ?? []), { messageText: hint, category, code }] };
}
