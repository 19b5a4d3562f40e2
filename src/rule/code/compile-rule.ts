import type { CompiledRule } from "../compiled-rule.js";
import type { Rule } from "../rule.js";
import { ruleDefinition } from "../rule-definition.js";
import { generateRule } from "./generate-rule.js";
import { interpretGraph } from "./interpret-graph.js";

const cache = new WeakMap<Rule, CompiledRule>();

/** Whether functions can be made from source here; some hosts forbid it. */
function allowsGeneratedCode(): boolean {
  try {
    new Function("");
    return true;
  } catch {
    return false;
  }
}

/**
 * Compiles a rule to functions over typed arrays; the result is cached for each rule.
 *
 * The functions are generated from the checked expression graph and contain slots only, no name of the text.
 * Where generated code is forbidden, the interpreter gives the same numbers.
 *
 * @param rule - from `recurrence`; a copy (from another thread or a file) is read again from its text.
 * @returns step, path and path with exact sensitivities; shapes in `CompiledRule`.
 * @example const { step } = compileRule(recurrence("N[t+1] = R*N"));
 */
export function compileRule(rule: Rule): CompiledRule {
  let found = cache.get(rule);
  if (found === undefined) {
    found = allowsGeneratedCode() ? generateRule(ruleDefinition(rule).graph) : interpretRule(rule);
    cache.set(rule, found);
  }
  return found;
}

/** The same as `compileRule`, by a plain interpreter of the expression graph: the same numbers, many times slower. */
export function interpretRule(rule: Rule): CompiledRule {
  return interpretGraph(ruleDefinition(rule).graph);
}
