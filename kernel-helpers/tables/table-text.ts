import { superscript } from "../wording/index.js";
import { displayWidth, oneLine, truncated } from "./plain-text.js";
import type { Table } from "./table.js";
import { type Cell, tableLayout } from "./table-layout.js";

const maxCellWidth = 44;

/** A table as aligned text for a terminal. */
export function tableText(table: Table): string {
  const layout = tableLayout(table);
  const all = [layout.headings, ...layout.rows, ...layout.totals];
  const marks = layout.headings.map((_, j) => Math.max(...all.map((line) => markLine(line[j]).length)));
  const lines = all.map((line) =>
    line.map((cell, j) => cellLine(cell, line === layout.headings ? 0 : (marks[j] ?? 0))),
  );
  const widths = layout.headings.map((_, j) => Math.max(...lines.map((line) => displayWidth(line[j] ?? ""))));
  const drawn = lines.map((line) =>
    line
      .map((text, j) => padded(text, widths[j] ?? 0, layout.headings[j]))
      .join("  ")
      .trimEnd(),
  );
  const rule = widths.map((width) => "─".repeat(width)).join("  ");
  const [top = "", ...body] = drawn;
  const rows = body.slice(0, layout.rows.length);
  if (layout.truncatedAfter !== undefined) rows.splice(layout.truncatedAfter, 0, "…");
  if (rows.length === 0) rows.push("(no rows)");
  const totals = body.slice(layout.rows.length);
  const notes = layout.notes.map(({ mark, text }) => (mark === "" ? "" : `${mark}: `) + oneLine(text));
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

/** Numbers are followed by space for the widest footnote mark of their column, so that they stay aligned. */
function cellLine(cell: Cell, room: number): string {
  const { text, numeric } = cell;
  const line = numeric ? text.replace(/[\u2007\u2008]/g, " ") : oneLine(text);
  // Numbers are not trimmed, to keep the padding that aligns decimal signs.
  const shown = truncated(/^[-<>]?\d/.test(line) && numeric ? line : oneLine(line), maxCellWidth);
  return shown + (numeric ? markLine(cell).padEnd(room) : markLine(cell));
}

function markLine(cell: Cell | undefined): string {
  return cell === undefined || cell.mark === "" ? "" : ` ${cell.mark})`;
}

function padded(text: string, width: number, column: Cell | undefined): string {
  const space = " ".repeat(Math.max(0, width - displayWidth(text)));
  return column?.numeric ? space + text : text + space;
}
