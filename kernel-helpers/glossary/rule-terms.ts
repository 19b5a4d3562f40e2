import { ruleLanguage } from "../../src/rule/index.js";
import { capitalizeSentence } from "../wording/index.js";
import { type Term, termsOf } from "./term.js";

const term = termsOf("rule language");

/** Functions and reserved words of the rule language. */
export function ruleTerms(): readonly Term[] {
  const { functions, words } = ruleLanguage();
  const named = [...words.map((word) => ({ ...word, usage: "" })), ...functions];
  return named.map(({ name, usage, meaning }) =>
    term(name, `${capitalizeSentence(meaning)}.${usage === "" ? "" : ` Written as ${usage}.`}`, {
      related: ["recurrence"],
    }),
  );
}
