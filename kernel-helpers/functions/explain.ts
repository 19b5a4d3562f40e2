import { nearestNames } from "../../src/numeric/index.js";
import { type Term, termOf, terms } from "../glossary/index.js";
import { checkCall } from "../options/index.js";
import { escapeHtml, showing } from "../tables/index.js";
import { refuseUnknownTerm } from "./refusals.js";

/** A word of the trade, explained; it shows itself. */
export interface Explanation {
  readonly kind: "explanation";
  readonly term: Term;
}

/**
 * Says what a word of the trade means, and what it is easily taken for.
 *
 * @param name - the term as it is spoken, whatever the case.
 * @throws {ModelError} `unknown-term` with the nearest ones.
 * @example explain("fill rate").term.field; // "stock"
 */
export function explain(name: string): Readonly<Explanation> {
  checkCall("explain", arguments);
  const known = terms.flatMap((one) => [one.name, ...one.otherNames]);
  const term = termOf(name);
  if (term === undefined) throw refuseUnknownTerm(name, nearestNames(name, known), known);
  return showing({ kind: "explanation" as const, term }, () => ({
    "text/html": explanationHtml(term),
    "text/markdown": explanationText(term, "**"),
    "text/plain": explanationText(term, ""),
  }));
}

function heading({ name, otherNames, field }: Term): string {
  const others = otherNames.length > 0 ? `, also ${otherNames.join(", ")}` : "";
  return `${name} (${field}${others})`;
}

function explanationText(term: Term, strong: string): string {
  const others = Object.entries(term.notToBeTakenFor).map(([other, why]) => `- not ${other}: ${why}`);
  const list = others.length > 0 ? `\n\n${others.join("\n")}` : "";
  return `${strong}${heading(term)}${strong}\n\n${term.meaning}${list}`;
}

function explanationHtml(term: Term): string {
  const others = Object.entries(term.notToBeTakenFor).map(
    ([other, why]) => `<li>not <i>${escapeHtml(other)}</i>: ${escapeHtml(why)}</li>`,
  );
  const list = others.length > 0 ? `<ul>${others.join("")}</ul>` : "";
  return `<p><b>${escapeHtml(heading(term))}</b></p><p>${escapeHtml(term.meaning)}</p>${list}`;
}
