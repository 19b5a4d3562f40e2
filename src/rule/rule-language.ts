import { type RuleFunction, ruleFunctions } from "./functions.js";
import type { Rule } from "./rule.js";

/** The rule language: functions, words, and the names of one rule. */
export interface RuleLanguage {
  readonly functions: readonly RuleFunction[];
  /** Forms of lines, indices and operators. */
  readonly forms: readonly { readonly name: string; readonly meaning: string }[];
  /** Reserved words that are not functions. */
  readonly words: readonly { readonly name: string; readonly meaning: string }[];
  /** Names of one rule with role and unit; empty when no rule was given. */
  readonly names: readonly { readonly name: string; readonly role: string; readonly unit: string }[];
}

const forms: RuleLanguage["forms"] = Object.freeze([
  { name: "N[t+1] = ...", meaning: "sets the next value of state N" },
  { name: "ΔN = ...", meaning: "sets the change of state N from this period to the next" },
  { name: "q = ...", meaning: "sets a quantity within the period, for use in the lines below" },
  { name: "N, N[t], N[t-2]", meaning: "present value of N, and its value two periods ago" },
  { name: "u[t+1]", meaning: "value of input u in the next period" },
  { name: "+ - * / ^", meaning: "arithmetic; products need *, powers ^" },
  { name: "< <= > >= == !=", meaning: "comparisons, for conditions" },
]);

const words: RuleLanguage["words"] = Object.freeze([
  { name: "t", meaning: "period index; 0 is the first recorded period" },
  { name: "and", meaning: "true when both conditions are true" },
  { name: "or", meaning: "true when at least one condition is true" },
  { name: "not", meaning: "true when the condition is false" },
]);

/**
 * Lists what can be written in a rule: functions, forms of lines, operators and reserved words, each with its
 * meaning; and the names of a rule if one is given.
 *
 * @example ruleLanguage().functions.map((one) => one.name).includes("sqrt"); // true
 */
export function ruleLanguage(rule?: Rule): RuleLanguage {
  const named = (role: string, names: readonly string[] = []): RuleLanguage["names"] =>
    names.map((name) => ({ name, role, unit: rule?.units[name] ?? "" }));
  return {
    functions: ruleFunctions,
    forms,
    words,
    names: [
      ...named("state", rule?.states),
      ...named("quantity", rule?.quantities),
      ...named("input", rule?.inputs),
      ...named("parameter", rule?.parameters),
    ],
  };
}
