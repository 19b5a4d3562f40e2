import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";

/**
 * The order of events within a period, as one line.
 *
 * @example eventOrder(recurrence("interest = i*owed\nΔowed = interest - p")); // "interest, then owed at t+1"
 */
export function eventOrder(rule: Rule): string {
  return ruleDefinition(rule)
    .checked.statements.map(({ kind, name }) => (kind === "quantity" ? name : `${name} at t+1`))
    .join(", then ");
}
