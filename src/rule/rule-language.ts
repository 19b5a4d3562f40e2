import { type RuleFunction, ruleFunctions } from "./functions.js";
import type { Rule } from "./rule.js";

/** What can be written in a rule, for completion and help. */
export interface RuleLanguage {
  readonly functions: readonly RuleFunction[];
  /** Words and signs with their meaning. */
  readonly words: readonly { readonly name: string; readonly meaning: string }[];
  /** The names of one rule and what each is. */
  readonly names: readonly { readonly name: string; readonly role: string; readonly unit: string }[];
}

const words: RuleLanguage["words"] = Object.freeze([
  { name: "t", meaning: "the period index, 0 at the first recorded period" },
  { name: "and", meaning: "both conditions hold" },
  { name: "or", meaning: "at least one condition holds" },
  { name: "not", meaning: "the condition does not hold" },
]);

/**
 * Lists the functions and words of the rule language, and the names of a rule if one is given.
 *
 * @example ruleLanguage().functions.map((one) => one.name).includes("sqrt"); // true
 */
export function ruleLanguage(rule?: Rule): RuleLanguage {
  const named = (role: string, names: readonly string[] = []): RuleLanguage["names"] =>
    names.map((name) => ({ name, role, unit: rule?.units[name] ?? "" }));
  return {
    functions: ruleFunctions,
    words,
    names: [
      ...named("state", rule?.states),
      ...named("quantity", rule?.quantities),
      ...named("input", rule?.inputs),
      ...named("parameter", rule?.parameters),
    ],
  };
}
