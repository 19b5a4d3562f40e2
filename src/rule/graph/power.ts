import type { Graph } from "./graph.js";
import type { Node } from "./node.js";

/** Small integer powers become products and a half becomes a root: equal up to rounding, many times faster. */
export function powerOf(graph: Graph, base: Node, exponent: Node): Node {
  if (exponent.kind === "number") {
    if (exponent.value === 2) return graph.apply("multiply", base, base);
    if (exponent.value === 3) return graph.apply("multiply", graph.apply("multiply", base, base), base);
    if (exponent.value === 0.5) return graph.apply("sqrt", base);
    if (exponent.value === -1) return graph.apply("divide", graph.number(1), base);
  }
  return graph.apply("power", base, exponent);
}
