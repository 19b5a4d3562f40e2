import { readFileSync } from "node:fs";
import { inspect } from "node:util";
import { CellError, type Complaint } from "./cell-error.js";
import type { Place } from "./source-places.js";
import type { Source, SourceRegister } from "./source-register.js";

/** An error as the protocol carries it. */
export interface ErrorReport {
  readonly ename: string;
  readonly evalue: string;
  readonly traceback: readonly string[];
}

const frame = /(?:\(|at (?:async )?)([^()\s][^()]*?):(\d+):(\d+)\)?$/;
const shownPlaces = 6;
const linesAround = 2;
/** The code of a cell begins on the second line of what runs, after the wrapper's own. */
const wrapperLines = 1;

/** Tells an error by the cells it came through: the place, the line with a caret, and the lines around. */
export function errorReport(
  cause: unknown,
  cellText: string,
  label: string,
  sources: SourceRegister,
): ErrorReport {
  if (cause instanceof CellError) {
    const places = cause.complaints
      .slice(0, shownPlaces)
      .map((complaint) => complaintText(complaint, cellText, label));
    if (cause.complaints.length > shownPlaces)
      places.push(`and ${cause.complaints.length - shownPlaces} more`);
    return {
      ename: cause.name,
      evalue: cause.message,
      traceback: [heading(cause.name, cause.message), ...places],
    };
  }
  const { ename, evalue } = named(cause);
  const places = stackPlaces(cause, sources).slice(0, shownPlaces);
  const traced = places.map(({ source, place }, index) =>
    placeText(index === 0 ? "in" : "called from", source.label, source.text ?? fileText(source.name), place),
  );
  return { ename, evalue, traceback: [heading(ename, evalue), ...traced, ...causes(cause)] };
}

function named(cause: unknown): { ename: string; evalue: string } {
  if (cause instanceof Error || (typeof cause === "object" && cause !== null && "message" in cause)) {
    const { name, message } = cause as Error;
    return { ename: String(name ?? "Error"), evalue: String(message) };
  }
  return { ename: "Thrown", evalue: inspect(cause) };
}

function heading(ename: string, evalue: string): string {
  return `\u001b[1;31m${ename}\u001b[0m: ${evalue}`;
}

function causes(cause: unknown): readonly string[] {
  const inner = cause instanceof Error ? cause.cause : undefined;
  if (inner === undefined) return [];
  const { ename, evalue } = named(inner);
  return [`because of ${ename}: ${evalue}`];
}

function complaintText(complaint: Complaint, cellText: string, label: string): string {
  const { file, start, end, text } = complaint;
  const width = start.line === end.line ? Math.max(1, end.column - start.column) : 1;
  const shown = placeText("in", file ?? label, file === undefined ? cellText : fileText(file), start, width);
  return `${text}\n${shown}`;
}

interface StackPlace {
  readonly source: Source;
  readonly place: Place;
}

function stackPlaces(cause: unknown, sources: SourceRegister): readonly StackPlace[] {
  const stack =
    cause instanceof Error || (typeof cause === "object" && cause !== null)
      ? Reflect.get(cause, "stack")
      : "";
  return String(stack ?? "")
    .split("\n")
    .flatMap((line) => {
      const [, name = "", row = "0", column = "0"] = frame.exec(line) ?? [];
      const source = sources.find(name);
      if (source === undefined) return [];
      const lead = source.text === undefined ? 0 : wrapperLines;
      const generated = { line: Number(row) - lead, column: Number(column) };
      const place = source.findPlace?.(generated);
      return place === undefined ? [] : [{ source, place }];
    });
}

function placeText(lead: string, label: string, text: string, place: Place, width = 1): string {
  const lines = text.split("\n");
  const first = Math.max(1, place.line - linesAround);
  const last = Math.min(lines.length, place.line + linesAround);
  const digits = String(last).length;
  const shown: string[] = [`${lead} ${label}, line ${place.line}`];
  for (let line = first; line <= last; line++) {
    const mark = line === place.line ? ">" : " ";
    shown.push(`${mark} ${String(line).padStart(digits)} | ${lines[line - 1] ?? ""}`);
    if (line === place.line)
      shown.push(`  ${" ".repeat(digits)} | ${" ".repeat(place.column - 1)}${"^".repeat(width)}`);
  }
  return shown.join("\n");
}

function fileText(path: string): string {
  try {
    return readFileSync(path, "utf8");
  } catch {
    return "";
  }
}
