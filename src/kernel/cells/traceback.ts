import { readFileSync } from "node:fs";
import { inspect } from "node:util";
import { type CellDiagnostic, CellError } from "./cell-error.js";
import { codeExcerpt } from "./code-excerpt.js";
import type { SourceRegistry } from "./source-registry.js";
import { type StackPosition, stackPositions } from "./stack-positions.js";

/** An error as the protocol carries it. */
export interface ErrorReport {
  readonly ename: string;
  readonly evalue: string;
  readonly traceback: readonly string[];
}

const maxPositions = 6;

/** Reports an error with the cells it passed through: position, line with a caret, and the lines around. */
export function errorReport(
  cause: unknown,
  cellText: string,
  label: string,
  sources: SourceRegistry,
): ErrorReport {
  try {
    if (cause instanceof CellError) return diagnosticsReport(cause, cellText, label);
    return thrownReport(cause, sources);
  } catch {
    // Inspecting the thrown value throws again.
    return { ename: "Thrown", evalue: "a value that cannot be displayed", traceback: [] };
  }
}

function diagnosticsReport(
  { name, message, diagnostics }: CellError,
  text: string,
  label: string,
): ErrorReport {
  const shown = diagnostics.slice(0, maxPositions);
  const places = shown.map((complaint, index) => diagnosticText(complaint, shown[index - 1], text, label));
  const more = diagnostics.length > maxPositions ? [`and ${diagnostics.length - maxPositions} more`] : [];
  return { ename: name, evalue: message, traceback: [heading(name, message), ...places, ...more] };
}

/** Does not repeat the heading, nor the excerpt for several messages at one position. */
function diagnosticText(
  { file, start, end, text }: CellDiagnostic,
  before: CellDiagnostic | undefined,
  cellText: string,
  label: string,
): string {
  if (before?.start.line === start.line && before.start.column === start.column) return `  ${text}`;
  const width = start.line === end.line ? Math.max(1, end.column - start.column) : 1;
  const shown = codeExcerpt(
    "in",
    file ?? label,
    file === undefined ? cellText : fileText(file),
    start,
    width,
  );
  return before === undefined ? shown : `${text}\n${shown}`;
}

function thrownReport(cause: unknown, sources: SourceRegistry): ErrorReport {
  const { ename, evalue } = nameAndMessage(cause);
  const all = stackPositions(cause, sources);
  // A nested call adds a stack frame on the same line, which shows nothing new.
  const places = all.filter((one, index) => !isSameLine(one, all[index - 1])).slice(0, maxPositions);
  const traced = places.map(({ source: { label, text, file = "" }, position }, index) =>
    codeExcerpt(index === 0 ? "in" : "called from", label, text ?? fileText(file), position),
  );
  return { ename, evalue, traceback: [heading(ename, evalue), ...traced, ...causeLines(cause)] };
}

function isSameLine(one: StackPosition, other: StackPosition | undefined): boolean {
  return one.source === other?.source && one.position.line === other.position.line;
}

function nameAndMessage(cause: unknown): { ename: string; evalue: string } {
  if (typeof cause !== "object" || cause === null || !("message" in cause)) {
    return { ename: "Thrown", evalue: inspect(cause) };
  }
  const { name, message } = cause as Error;
  return { ename: String(name ?? "Error"), evalue: String(message) };
}

function heading(ename: string, evalue: string): string {
  return `\u001b[1;31m${ename}\u001b[0m: ${evalue}`;
}

/** The cause of an error and the parts of an AggregateError; errors with `facts` have a complete message. */
function causeLines(cause: unknown): readonly string[] {
  if (!(cause instanceof Error) || "facts" in cause) return [];
  const parts: readonly unknown[] =
    cause instanceof AggregateError ? cause.errors.slice(0, maxPositions) : [];
  const lines = parts.map(nameAndMessage).map(({ ename, evalue }) => `- ${ename}: ${evalue}`);
  if (cause.cause === undefined) return lines;
  const { ename, evalue } = nameAndMessage(cause.cause);
  return [...lines, `caused by ${ename}: ${evalue}`];
}

function fileText(path: string): string {
  try {
    return readFileSync(path, "utf8");
  } catch {
    return "";
  }
}
