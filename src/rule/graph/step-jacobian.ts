import { derivativeBy } from "./differentiate.js";
import type { Node } from "./node.js";
import type { RuleGraph } from "./rule-graph.js";

/** Partial derivatives of one step. */
export interface StepJacobian {
  /** [slot][slot]: next value of the first by the present value of the second. */
  readonly byState: readonly (readonly Node[])[];
  /** [slot][parameter] */
  readonly byParameter: readonly (readonly Node[])[];
}

const cache = new WeakMap<RuleGraph, StepJacobian>();

/** All partial derivatives of one step of a rule, cached. */
export function stepJacobian(rule: RuleGraph): StepJacobian {
  let found = cache.get(rule);
  if (found === undefined) {
    const by = (role: "state" | "parameter", count: number): readonly (readonly Node[])[] => {
      const columns = Array.from({ length: count }, (_, slot) => {
        const derivative = derivativeBy(rule.graph, rule.graph.leaf(role, slot));
        return rule.next.map(derivative);
      });
      return rule.next.map((_, row) => columns.map((column) => column[row]!));
    };
    found = { byState: by("state", rule.states), byParameter: by("parameter", rule.parameters) };
    cache.set(rule, found);
  }
  return found;
}
