import type { Place } from "./source-places.js";

const linesAround = 2;

/** A place in a text with its line, a caret below it, and the lines around. */
export function placeText(lead: string, label: string, text: string, place: Place, width = 1): string {
  const lines = text.split("\n");
  const first = Math.max(1, place.line - linesAround);
  const last = Math.min(lines.length, place.line + linesAround);
  const digits = String(last).length;
  const shown: string[] = [`${lead} ${label}, line ${place.line}`];
  for (let line = first; line <= last; line++) {
    const mark = line === place.line ? ">" : " ";
    const content = lines[line - 1] ?? "";
    shown.push(`${mark} ${String(line).padStart(digits)} | ${content}`);
    if (line !== place.line) continue;
    // Tabs stay tabs, so that the caret stands where the reader's screen puts the character.
    const before = content.slice(0, place.column - 1).replace(/[^\t]/g, " ");
    shown.push(`  ${" ".repeat(digits)} | ${before}${"^".repeat(width)}`);
  }
  return shown.join("\n");
}
