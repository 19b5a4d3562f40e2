import { derivativeBy } from "./graph/differentiate.js";
import { stepJacobian } from "./graph/step-jacobian.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";

/**
 * Tells whether one step of the rule is linear in the given parameters taken together, for fixed states and
 * inputs. A one-step fit of such a rule has a single optimum, found in one solve.
 *
 * @param among - the parameters that are free; default all of the rule.
 * @example linearInParameters(recurrence("N[t+1] = a*N + b")); // true
 */
export function linearInParameters(rule: Rule, among: readonly string[] = rule.parameters): boolean {
  const { graph } = ruleDefinition(rule).graph;
  const { byParameter } = stepJacobian(ruleDefinition(rule).graph);
  const slots = among.map((name) => rule.parameters.indexOf(name)).filter((slot) => slot >= 0);
  const zero = graph.number(0);
  return slots.every((slot) => {
    const secondBy = derivativeBy(graph, graph.leaf("parameter", slot));
    return byParameter.every((row) => slots.every((other) => secondBy(row[other]!) === zero));
  });
}
