import { didYouMean, ModelError } from "../../src/numeric/index.js";
import { plural } from "../wording/index.js";
import { nearestTerms, termsByField } from "./look-up.js";

/** @param field - field of the open case, whose terms are listed first. */
export function unknownTermError(word: string, field?: string): ModelError {
  const nearest = nearestTerms(word);
  const more = nearest.length > 0 ? didYouMean(nearest) : `\n${termLists(field)}`;
  return new ModelError("unknown-term", `There is no explanation of "${word}".${more}`, { word, nearest });
}

/** The terms of the case's own field and the general ones by name, those of other fields by number. */
function termLists(field: string | undefined): string {
  const groups = termsByField(field);
  const isListed = (one: string): boolean => one === field || one === "general";
  const heading = (one: string): string => (one === "general" ? "General terms" : `Terms of ${one}`);
  const listed = groups.filter((group) => isListed(group.field));
  const others = groups.filter((group) => !isListed(group.field));
  return [
    ...listed.map((group) => `${heading(group.field)}: ${group.names.join(", ")}.`),
    `Other fields: ${others.map((group) => `${group.field} (${plural(group.names.length, "term")})`).join(", ")}.`,
  ].join("\n");
}
