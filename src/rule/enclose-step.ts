import { graphOrder } from "./graph/graph-order.js";
import { type Interval, plus } from "./graph/interval.js";
import { intervalOperations } from "./graph/interval-operations.js";
import type { Node } from "./graph/node.js";
import { stepDerivatives } from "./graph/step-derivatives.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";

/** Bounds on one step and its slope over a whole interval of the present value. */
export interface StepEnclosure {
  readonly value: Interval;
  readonly slope: Interval;
}

/** Constants and inputs by slot, inputs held at one value. */
export interface HeldValues {
  readonly constants: Float64Array;
  readonly inputs: Float64Array;
}

/**
 * For a rule of one state: a function that encloses the next value and its slope over an interval, past values
 * being the same as the present one. Every value that the step takes on the interval lies within `value`, and
 * every slope within `slope`.
 */
export function encloseStep(rule: Rule, held: HeldValues): (present: Interval) => StepEnclosure {
  const { graph } = ruleDefinition(rule);
  const next = graph.next[0]!;
  const slopes = stepDerivatives(graph).byState[0]!;
  const ordered = graphOrder([next, ...slopes]);
  const place = new Map(ordered.map((node, index) => [node, index]));
  const insides = ordered.map((node) =>
    node.kind === "inner" ? node.inside.map((part) => place.get(part)!) : [],
  );
  const tape: Interval[] = new Array(ordered.length);
  const read = (node: Node): Interval => tape[place.get(node)!]!;
  return (present) => {
    ordered.forEach((node, index) => {
      if (node.kind === "number") tape[index] = [node.value, node.value];
      else if (node.kind === "leaf") tape[index] = leafInterval(node, held, present);
      else {
        const [a = 0, b = a, c = a] = insides[index]!;
        tape[index] = intervalOperations[node.operator](tape[a]!, tape[b]!, tape[c]!);
      }
    });
    return { value: read(next), slope: slopes.map(read).reduce(plus) };
  };
}

function leafInterval(node: Extract<Node, { kind: "leaf" }>, held: HeldValues, present: Interval): Interval {
  if (node.role === "state") return present;
  const values = node.role === "constant" ? held.constants : held.inputs;
  const value = node.role === "period" ? Number.NaN : values[node.slot]!;
  return [value, value];
}
