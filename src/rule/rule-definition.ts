import { checkRule } from "./check/check-rule.js";
import type { CheckedRule, Declarations } from "./check/checked-rule.js";
import { buildGraph } from "./graph/build-graph.js";
import type { RuleGraph } from "./graph/rule-graph.js";
import type { Rule } from "./rule.js";
import { parseRule } from "./syntax/parse-rule.js";

/** The checked lines and the expression graph of a rule. */
export interface RuleDefinition {
  readonly checked: CheckedRule;
  readonly graph: RuleGraph;
}

const cache = new WeakMap<Rule, RuleDefinition>();

/** Reads, checks and builds a rule's text, which must be normalised. */
export function defineRule(text: string, declared: Declarations): RuleDefinition {
  const checked = checkRule(text, parseRule(text), declared);
  return { checked, graph: buildGraph(checked) };
}

/** Stores the definition beside the rule, so that the rule itself stays a plain object. */
export const storeDefinition = (rule: Rule, definition: RuleDefinition): void => {
  cache.set(rule, definition);
};

/** The definition behind a rule. A copied rule has none yet: its text is read again. */
export function ruleDefinition(rule: Rule): RuleDefinition {
  let found = cache.get(rule);
  if (found === undefined) {
    found = defineRule(rule.text, { parameters: rule.parameters, inputs: rule.inputs });
    cache.set(rule, found);
  }
  return found;
}
