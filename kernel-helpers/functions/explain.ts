import { explanationHtml, explanationText, lookUp, type Term, unknownTermError } from "../glossary/index.js";
import { checkCall } from "../options/index.js";
import { showing } from "../tables/index.js";
import { caseLog } from "./case-log.js";

/** A term of the glossary. */
export interface Explanation {
  readonly kind: "explanation";
  readonly term: Term;
  /** Other terms that the word could mean. */
  readonly others: readonly string[];
}

/**
 * Explains a term: its meaning, formula and unit, and what it is mistaken for. It knows the terms of every field, of
 * fits, tests and forecasts, and the functions of the rule language; a related word leads to its term.
 *
 * @param word - the term, in any case, singular or plural.
 * @throws {ModelError} `unknown-term`, with the nearest terms and those of the case's own field.
 * @example explain("fill rate").term.field; // "stock"
 */
export function explain(word: string): Readonly<Explanation> {
  checkCall("explain", arguments);
  const field = caseLog.head()?.domain;
  const found = lookUp(word, field);
  if (found === undefined) throw unknownTermError(word, field);
  const { term, others } = found;
  return showing({ kind: "explanation" as const, term, others }, () => ({
    "text/html": explanationHtml(word, found),
    "text/markdown": explanationText(word, found, "**"),
    "text/plain": explanationText(word, found),
  }));
}
