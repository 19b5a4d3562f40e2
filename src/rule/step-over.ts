import { type Algebra, evaluatorOver } from "./graph/evaluate-over.js";
import { graphOrder } from "./graph/graph-order.js";
import { type Interval, roundOutward } from "./graph/interval.js";
import { intervalOperations } from "./graph/interval-operations.js";
import type { Node } from "./graph/node.js";
import { stepJacobian } from "./graph/step-jacobian.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";

/** Arguments of a step in some algebra; each role by slot. */
export interface StepArgumentsOver<T> {
  readonly state: readonly T[];
  readonly parameters: readonly T[];
  /** Value of an input some periods from t. */
  readonly input: (slot: number, offset: number) => T;
  readonly t: T;
}

/** Steps of a rule in another algebra. */
export interface StepOver<T> {
  /** The next state vector. */
  readonly next: (place: StepArgumentsOver<T>) => readonly T[];
  /** Its Jacobian [slot][slot] by the present one. */
  readonly slopes: (place: StepArgumentsOver<T>) => readonly (readonly T[])[];
}

/** Compiles a rule for another algebra. */
export function stepOver<T>(rule: Rule, algebra: Algebra<T>): StepOver<T> {
  const { graph } = ruleDefinition(rule);
  const width = graph.states;
  const next = evaluatorOver(graph.next, algebra);
  const slopes = evaluatorOver(stepJacobian(graph).byState.flat(), algebra);
  const leafAt =
    (place: StepArgumentsOver<T>) =>
    (leaf: Extract<Node, { kind: "leaf" }>): T => {
      if (leaf.role === "state") return place.state[leaf.slot]!;
      if (leaf.role === "parameter") return place.parameters[leaf.slot]!;
      return leaf.role === "period" ? place.t : place.input(leaf.slot, leaf.offset);
    };
  return {
    next: (place) => next(leafAt(place)),
    slopes: (place) => {
      const values = slopes(leafAt(place));
      return Array.from({ length: width }, (_, i) => values.slice(width * i, width * (i + 1)));
    },
  };
}

/** Interval arithmetic: every result contains the exact one. */
export const intervalAlgebra: Algebra<Interval> = {
  number: (value) => (Number.isInteger(value) ? [value, value] : roundOutward(value, value)),
  operations: intervalOperations,
};

/** Whether the next state is a fixed linear function of the present one: no slope reads a state, an input or t. */
export function isLinearInStates(rule: Rule): boolean {
  const slopes = stepJacobian(ruleDefinition(rule).graph).byState.flat();
  return graphOrder(slopes).every((node) => node.kind !== "leaf" || node.role === "parameter");
}
