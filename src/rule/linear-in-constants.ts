import { derivativeBy } from "./graph/differentiate.js";
import { stepDerivatives } from "./graph/step-derivatives.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";

/**
 * Tells whether one step of the rule is linear in the given constants taken together, for fixed states and
 * inputs. A one-step fit of such a rule has a single optimum, found in one solve.
 *
 * @param among - the constants that are free; default all of the rule.
 * @example linearInConstants(recurrence("N[t+1] = a*N + b")); // true
 */
export function linearInConstants(rule: Rule, among: readonly string[] = rule.constants): boolean {
  const { graph } = ruleDefinition(rule).graph;
  const { byConstant } = stepDerivatives(ruleDefinition(rule).graph);
  const slots = among.map((name) => rule.constants.indexOf(name)).filter((slot) => slot >= 0);
  const zero = graph.number(0);
  return slots.every((slot) => {
    const secondBy = derivativeBy(graph, graph.leaf("constant", slot));
    return byConstant.every((row) => slots.every((other) => secondBy(row[other]!) === zero));
  });
}
