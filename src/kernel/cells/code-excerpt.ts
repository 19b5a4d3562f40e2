import type { Position } from "./source-positions.js";

const contextLines = 2;

/** A code excerpt around a position, with a caret below it. */
export function codeExcerpt(
  lead: string,
  label: string,
  text: string,
  position: Position,
  width = 1,
): string {
  const lines = text.split("\n");
  const first = Math.max(1, position.line - contextLines);
  const last = Math.min(lines.length, position.line + contextLines);
  const digits = String(last).length;
  const shown: string[] = [`${lead} ${label}, line ${position.line}`];
  for (let line = first; line <= last; line++) {
    const mark = line === position.line ? ">" : " ";
    const content = lines[line - 1] ?? "";
    shown.push(`${mark} ${String(line).padStart(digits)} | ${content}`);
    if (line !== position.line) continue;
    // Tabs stay tabs, so that the caret lines up with the character.
    const before = content.slice(0, position.column - 1).replace(/[^\t]/g, " ");
    shown.push(`  ${" ".repeat(digits)} | ${before}${"^".repeat(width)}`);
  }
  return shown.join("\n");
}
