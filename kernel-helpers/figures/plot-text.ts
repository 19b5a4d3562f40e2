import { oneLine, superscript } from "../tables/index.js";

/**
 * Text for a plot label, which accepts some HTML: escaped, and wrapped at words.
 *
 * @param columns - characters per line; a longer word is cut.
 * @param lines - maximum number of lines; the rest is replaced by an ellipsis.
 */
export function plotText(text: string, columns: number, lines: number = 2): string {
  return brokenLines(oneLine(text), columns, lines).map(plotEscaped).join("<br>");
}

/** Escapes markup, dollar signs (TeX) and character references. */
function plotEscaped(text: string): string {
  return text.replace(/[&<>$]/g, (sign) => `&#${sign.codePointAt(0)};`);
}

function brokenLines(text: string, columns: number, lines: number): string[] {
  const broken: string[] = [];
  let line = "";
  for (const word of text.split(" ")) {
    const piece = [...word].length > columns ? `${[...word].slice(0, columns - 1).join("")}…` : word;
    if (line !== "" && line.length + 1 + piece.length > columns) {
      broken.push(line);
      line = piece;
    } else {
      line = line === "" ? piece : `${line} ${piece}`;
    }
  }
  broken.push(line);
  return broken.length <= lines
    ? broken
    : [...broken.slice(0, lines - 1), `${broken[lines - 1]?.replace(/…$/, "")}…`];
}

/** Axis title with unit, "Density (10⁴ cells/mL)", unless both are the same word. */
export function axisTitle(axis: { readonly title: string; readonly unit?: string }): string {
  if (!axis.unit || axis.unit.toLowerCase() === axis.title.toLowerCase()) return axis.title;
  return `${axis.title} (${superscript(axis.unit)})`;
}
