import { lookUp, terms } from "../../kernel-helpers/glossary/index.js";
import type { StringLanguage } from "../kernel/index.js";

/** Completion and help inside `explain("...")`. */
export const glossaryTerms: StringLanguage = {
  matches: (callee, argument) => argument === 0 && /(^|\.)explain$/.test(callee),
  complete: (text, position) => {
    const begun = text.slice(0, position).trimStart().toLowerCase();
    const names = terms.flatMap((one) => [one.name, ...one.otherNames]);
    const items = names.filter((name) => name.toLowerCase().startsWith(begun));
    return { start: 0, end: text.length, items: items.map((name) => ({ text: name, kind: "term" })) };
  },
  inspect: (text) => lookUp(text)?.term.meaning,
  // An unknown term is rejected by the function itself, with the nearest ones.
  check: () => [],
};
