export { compileRule, interpretRule } from "./code/compile-rule.js";
export type { CompiledRule } from "./compiled-rule.js";
export type { RuleFunction } from "./functions.js";
export { linearInConstants } from "./linear-in-constants.js";
export { recurrence } from "./recurrence.js";
export type { RecurrenceOptions } from "./recurrence-options.js";
export type { ProcessNoise, Rule } from "./rule.js";
export { type RuleLanguage, ruleLanguage } from "./rule-language.js";
export { ruleText } from "./rule-text.js";
