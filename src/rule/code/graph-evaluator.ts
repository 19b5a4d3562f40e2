import type { StepArguments } from "../explain-failure.js";
import { graphOrder } from "../graph/graph-order.js";
import type { Node } from "../graph/node.js";
import { operations } from "../graph/operations.js";

function leafValue(node: Extract<Node, { kind: "leaf" }>, place: StepArguments): number {
  if (node.role === "state") return place.state[node.slot]!;
  if (node.role === "parameter") return place.parameters[node.slot]!;
  if (node.role === "period") return place.t;
  return place.inputs[node.slot]![place.t + node.offset] ?? Number.NaN;
}

/** Gives the value of a node in the last evaluation. */
export type ReadNode = (node: Node) => number;

/** Evaluates nodes one after the other: the same operations in the same order as the generated code. */
export function graphEvaluator(roots: readonly Node[]): (place: StepArguments) => ReadNode {
  const ordered = graphOrder(roots);
  const position = new Map(ordered.map((node, index) => [node, index]));
  const tape = new Float64Array(ordered.length);
  const read: ReadNode = (node) => tape[position.get(node)!]!;
  return (place) => {
    ordered.forEach((node, index) => {
      if (node.kind === "number") tape[index] = node.value;
      else if (node.kind === "leaf") tape[index] = leafValue(node, place);
      else {
        const [a, b = a!, c = a!] = node.args;
        tape[index] = operations[node.operator].value(read(a!), read(b), read(c));
      }
    });
    return read;
  };
}
