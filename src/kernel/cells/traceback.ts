import { readFileSync } from "node:fs";
import { inspect } from "node:util";
import { CellError, type Complaint } from "./cell-error.js";
import { placeText } from "./place-text.js";
import type { SourceRegister } from "./source-register.js";
import { type StackPlace, stackPlaces } from "./stack-places.js";

/** An error as the protocol carries it. */
export interface ErrorReport {
  readonly ename: string;
  readonly evalue: string;
  readonly traceback: readonly string[];
}

const shownPlaces = 6;

/** Tells an error by the cells it came through: the place, the line with a caret, and the lines around. */
export function errorReport(
  cause: unknown,
  cellText: string,
  label: string,
  sources: SourceRegister,
): ErrorReport {
  try {
    if (cause instanceof CellError) return refusedReport(cause, cellText, label);
    return thrownReport(cause, sources);
  } catch {
    // What was thrown cannot be looked at without throwing again.
    return { ename: "Thrown", evalue: "something that cannot be shown", traceback: [] };
  }
}

function refusedReport({ name, message, complaints }: CellError, text: string, label: string): ErrorReport {
  const shown = complaints.slice(0, shownPlaces);
  const places = shown.map((complaint, index) => complaintText(complaint, shown[index - 1], text, label));
  const more = complaints.length > shownPlaces ? [`and ${complaints.length - shownPlaces} more`] : [];
  return { ename: name, evalue: message, traceback: [heading(name, message), ...places, ...more] };
}

/** What the heading says already is not said again, nor is a place shown twice for the parts of one message. */
function complaintText(
  { file, start, end, text }: Complaint,
  before: Complaint | undefined,
  cellText: string,
  label: string,
): string {
  if (before?.start.line === start.line && before.start.column === start.column) return `  ${text}`;
  const width = start.line === end.line ? Math.max(1, end.column - start.column) : 1;
  const shown = placeText("in", file ?? label, file === undefined ? cellText : fileText(file), start, width);
  return before === undefined ? shown : `${text}\n${shown}`;
}

function thrownReport(cause: unknown, sources: SourceRegister): ErrorReport {
  const { ename, evalue } = named(cause);
  const all = stackPlaces(cause, sources);
  // A call inside an expression adds a step on the same line, which shows nothing new.
  const places = all.filter((one, index) => !isSameLine(one, all[index - 1])).slice(0, shownPlaces);
  const traced = places.map(({ source: { label, text, file = "" }, place }, index) =>
    placeText(index === 0 ? "in" : "called from", label, text ?? fileText(file), place),
  );
  return { ename, evalue, traceback: [heading(ename, evalue), ...traced, ...causeLines(cause)] };
}

function isSameLine(one: StackPlace, other: StackPlace | undefined): boolean {
  return one.source === other?.source && one.place.line === other.place.line;
}

function named(cause: unknown): { ename: string; evalue: string } {
  if (typeof cause !== "object" || cause === null || !("message" in cause)) {
    return { ename: "Thrown", evalue: inspect(cause) };
  }
  const { name, message } = cause as Error;
  return { ename: String(name ?? "Error"), evalue: String(message) };
}

function heading(ename: string, evalue: string): string {
  return `\u001b[1;31m${ename}\u001b[0m: ${evalue}`;
}

/** What an error came from, unless it carries the facts of its case: then its own message tells all. */
function causeLines(cause: unknown): readonly string[] {
  const inner = cause instanceof Error ? cause.cause : undefined;
  if (!(cause instanceof Error) || inner === undefined || "facts" in cause) return [];
  const { ename, evalue } = named(inner);
  return [`because of ${ename}: ${evalue}`];
}

function fileText(path: string): string {
  try {
    return readFileSync(path, "utf8");
  } catch {
    return "";
  }
}
