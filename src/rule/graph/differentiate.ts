import { derivativeArithmetic } from "./derivative-arithmetic.js";
import type { Graph } from "./graph.js";
import { innerDerivative } from "./inner-derivative.js";
import type { Node } from "./node.js";

/**
 * Exact derivatives of nodes by one leaf. Where a function has a kink (min, max, abs, if) the derivative is that
 * of the branch taken, so at the kink itself it is one-sided; floor, ceil, round and sign have derivative 0.
 */
export function derivativeBy(graph: Graph, leaf: Node): (node: Node) => Node {
  const zero = graph.number(0);
  const one = graph.number(1);
  const known = new Map<Node, Node>();
  const arithmetic = derivativeArithmetic(graph);
  const of = (node: Node): Node => {
    if (node === leaf) return one;
    if (node.kind !== "inner") return zero;
    let derivative = known.get(node);
    if (derivative === undefined) {
      const inside = node.args.map(of);
      derivative = inside.every((d) => d === zero) ? zero : innerDerivative(arithmetic, node, inside);
      known.set(node, derivative);
    }
    return derivative;
  };
  return of;
}
