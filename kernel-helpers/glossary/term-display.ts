import { escapeHtml, list } from "../wording/index.js";
import type { LookUp } from "./look-up.js";
import type { Term } from "./term.js";

/** The line above an explanation when the word asked for is not the term itself, or has several meanings. */
function choiceLine(word: string, { term, isExact, others }: LookUp): string {
  const more =
    others.length === 0
      ? ""
      : list(
          others.map((name) => `"${name}"`),
          "or",
        );
  if (!isExact)
    return `"${word.trim()}" is explained as "${term.name}"${more === "" ? "" : `; it can also mean ${more}`}.`;
  return more === "" ? "" : `It can also mean ${more}.`;
}

function heading({ name, otherNames, field }: Term): string {
  const synonyms = otherNames.length > 0 ? `; also ${otherNames.join(", ")}` : "";
  return `${name} (${field === "general" ? "all fields" : field}${synonyms})`;
}

/** Formula, unit and related terms, as lines of a label and a text. */
function details({ formula, unit, related }: Term): readonly (readonly [string, string])[] {
  const lines = [
    ["Formula", formula],
    ["Unit", unit],
    ["See also", related.join(", ")],
  ] as const;
  return lines.filter(([, text]) => text !== "");
}

/** An explanation as Markdown, or as plain text without `strong`. */
export function explanationText(word: string, found: LookUp, strong: "**" | "" = ""): string {
  const { term } = found;
  const code = strong === "" ? "" : "`";
  const mistaken = Object.entries(term.mistakenFor).map(([other, why]) => `- ${other}: ${why}`);
  const paragraphs = [
    choiceLine(word, found),
    `${strong}${heading(term)}${strong}`,
    term.meaning,
    ...details(term).map(
      ([label, text]) => `${label}: ${label === "Formula" ? `${code}${text}${code}` : text}`,
    ),
    mistaken.length === 0 ? "" : `Not to be confused with:\n${mistaken.join("\n")}`,
  ];
  return paragraphs.filter((paragraph) => paragraph !== "").join("\n\n");
}

/** An explanation as HTML. */
export function explanationHtml(word: string, found: LookUp): string {
  const { term } = found;
  const mistaken = Object.entries(term.mistakenFor).map(
    ([other, why]) => `<li><i>${escapeHtml(other)}</i>: ${escapeHtml(why)}</li>`,
  );
  const choice = choiceLine(word, found);
  return [
    choice === "" ? "" : `<p>${escapeHtml(choice)}</p>`,
    `<p><b>${escapeHtml(heading(term))}</b></p><p>${escapeHtml(term.meaning)}</p>`,
    ...details(term).map(([label, text]) => {
      const shown = escapeHtml(text);
      return `<p>${label}: ${label === "Formula" ? `<code>${shown}</code>` : shown}</p>`;
    }),
    mistaken.length === 0 ? "" : `<p>Not to be confused with:</p><ul>${mistaken.join("")}</ul>`,
  ].join("");
}
