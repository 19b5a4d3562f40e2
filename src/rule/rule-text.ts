import { expressionText } from "./expression-text.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";
import type { Statement } from "./syntax/expression.js";

/** Canonical text of one line. */
export function statementText({ kind, name, expression }: Statement): string {
  const target = kind === "next" ? `${name}[t+1]` : kind === "change" ? `Δ${name}` : name;
  return `${target} = ${expressionText(expression)}`;
}

/**
 * Prints a rule in canonical form: one line a quantity in event order, comments left out. Reading the result
 * with the same options gives the same rule.
 *
 * @example ruleText(recurrence("change(N) = (r*N) * (1-N/K)")); // "ΔN = r*N*(1 - N/K)"
 */
export function ruleText(rule: Rule): string {
  return ruleDefinition(rule).checked.statements.map(statementText).join("\n");
}
