import type { Graph } from "./graph.js";
import type { Node } from "./node.js";

/** Sums and products for derivatives, where a factor of exactly zero makes the product zero. */
export interface DerivativeArithmetic {
  readonly graph: Graph;
  readonly zero: Node;
  readonly add: (a: Node, b: Node) => Node;
  readonly subtract: (a: Node, b: Node) => Node;
  readonly multiply: (a: Node, b: Node) => Node;
  readonly negate: (a: Node) => Node;
  /** 1/a, shared by all divisions by a. */
  readonly reciprocal: (a: Node) => Node;
}

export function derivativeArithmetic(graph: Graph): DerivativeArithmetic {
  const zero = graph.number(0);
  const one = graph.number(1);
  const minusOne = graph.number(-1);
  const negate = (a: Node): Node => graph.apply("negate", a);
  return {
    graph,
    zero,
    negate,
    add: (a, b) => graph.apply("add", a, b),
    subtract: (a, b) => (a === zero ? negate(b) : graph.apply("subtract", a, b)),
    multiply: (a, b) => {
      if (a === zero || b === zero) return zero;
      if (a === minusOne) return negate(b);
      if (b === minusOne) return negate(a);
      return graph.apply("multiply", a, b);
    },
    reciprocal: (a) => graph.apply("divide", one, a),
  };
}
