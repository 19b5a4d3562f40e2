export type { CompiledRule } from "./compiled-rule.js";
export type { Rule } from "./rule.js";
