import { superscript } from "../wording/index.js";
import { type Cell, laidOut } from "./laid-out.js";
import { displayWidth, oneLine, shortened } from "./plain-text.js";
import type { Table } from "./table.js";

const widestCell = 44;

/** A table as text that lines up in a terminal. */
export function tableText(table: Table): string {
  const laid = laidOut(table);
  const all = [laid.headings, ...laid.rows, ...laid.totals];
  const marks = laid.headings.map((_, j) => Math.max(...all.map((line) => markLine(line[j]).length)));
  const lines = all.map((line) =>
    line.map((cell, j) => cellLine(cell, line === laid.headings ? 0 : (marks[j] ?? 0))),
  );
  const widths = laid.headings.map((_, j) => Math.max(...lines.map((line) => displayWidth(line[j] ?? ""))));
  const drawn = lines.map((line) =>
    line
      .map((text, j) => padded(text, widths[j] ?? 0, laid.headings[j]))
      .join("  ")
      .trimEnd(),
  );
  const rule = widths.map((width) => "─".repeat(width)).join("  ");
  const [top = "", ...body] = drawn;
  const rows = body.slice(0, laid.rows.length);
  if (laid.cutAfter !== undefined) rows.splice(laid.cutAfter, 0, "…");
  if (rows.length === 0) rows.push("(no rows)");
  const totals = body.slice(laid.rows.length);
  const notes = laid.notes.map(({ mark, text }) => (mark === "" ? "" : `${mark}: `) + oneLine(text));
  return [
    oneLine(superscript(table.title)),
    "",
    top,
    rule,
    ...rows,
    ...(totals.length > 0 ? [rule, ...totals] : []),
    ...(notes.length > 0 ? ["", ...notes] : []),
  ].join("\n");
}

/** Numbers are followed by room for the widest mark of their column, so that marks do not push them out of line. */
function cellLine(cell: Cell, room: number): string {
  const { text, numeric } = cell;
  const line = numeric ? text.replace(/[\u2007\u2008]/g, " ") : oneLine(text);
  // The padding that lines up decimal signs must survive, so numbers are not trimmed.
  const shown = shortened(/^[-<>]?\d/.test(line) && numeric ? line : oneLine(line), widestCell);
  return shown + (numeric ? markLine(cell).padEnd(room) : markLine(cell));
}

function markLine(cell: Cell | undefined): string {
  return cell === undefined || cell.mark === "" ? "" : ` ${cell.mark})`;
}

function padded(text: string, width: number, column: Cell | undefined): string {
  const space = " ".repeat(Math.max(0, width - displayWidth(text)));
  return column?.numeric ? space + text : text + space;
}
