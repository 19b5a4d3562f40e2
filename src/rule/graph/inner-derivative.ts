import type { DerivativeArithmetic } from "./derivative-arithmetic.js";
import type { Node, Operator } from "./node.js";
import { powerOf } from "./power.js";

type Inner = Extract<Node, { kind: "inner" }>;
/** The derivative of `node` from those of its arguments (chain rule). */
type Derivative = (use: DerivativeArithmetic, node: Inner, a: Node, b: Node, c: Node) => Node;

/** Derivative of the branch taken, never a weighted sum: the other branch may be infinite. */
const branch = (use: DerivativeArithmetic, condition: Node, a: Node, b: Node): Node =>
  a === b ? a : use.graph.apply("choose", condition, a, b);

const none: Derivative = (use) => use.zero;

const power: Derivative = (use, node, da, db) => {
  const { graph } = use;
  const [base, exponent] = node.args as [Node, Node];
  const lowered = powerOf(graph, base, graph.apply("subtract", exponent, graph.number(1)));
  const byBase = use.multiply(use.multiply(exponent, lowered), da);
  if (db === use.zero) return byBase;
  // 0^b does not move with b > 0, though its logarithm is infinite.
  const atZero = graph.apply("equal", base, use.zero);
  const byExponent = branch(use, atZero, use.zero, use.multiply(node, graph.apply("log", base)));
  return use.add(byBase, use.multiply(byExponent, db));
};

const derivatives: Readonly<Record<Operator, Derivative>> = {
  add: (use, _, a, b) => use.add(a, b),
  subtract: (use, _, a, b) => use.subtract(a, b),
  multiply: (use, node, a, b) => use.add(use.multiply(a, node.args[1]!), use.multiply(node.args[0]!, b)),
  divide: (use, node, a, b) =>
    use.multiply(use.subtract(a, use.multiply(node, b)), use.reciprocal(node.args[1]!)),
  power,
  negate: (use, _, a) => use.negate(a),
  less: none,
  lessOrEqual: none,
  equal: none,
  and: none,
  or: none,
  not: none,
  choose: (use, node, _, b, c) => branch(use, node.args[0]!, b, c),
  exp: (use, node, a) => use.multiply(node, a),
  log: (use, node, a) => use.multiply(a, use.reciprocal(node.args[0]!)),
  log10: (use, node, a) =>
    use.multiply(a, use.reciprocal(use.multiply(node.args[0]!, use.graph.number(Math.LN10)))),
  sqrt: (use, node, a) => use.multiply(a, use.reciprocal(use.multiply(use.graph.number(2), node))),
  abs: (use, node, a) => branch(use, use.graph.apply("less", node.args[0]!, use.zero), use.negate(a), a),
  sign: none,
  min: (use, node, a, b) => branch(use, use.graph.apply("lessOrEqual", node.args[0]!, node.args[1]!), a, b),
  max: (use, node, a, b) => branch(use, use.graph.apply("less", node.args[0]!, node.args[1]!), b, a),
  floor: none,
  ceil: none,
  round: none,
  mod: (use, node, a, b) => {
    const [x, divisor] = node.args as [Node, Node];
    const whole = use.graph.apply("floor", use.graph.apply("divide", x, divisor));
    return use.subtract(a, use.multiply(whole, b));
  },
  sin: (use, node, a) => use.multiply(use.graph.apply("cos", node.args[0]!), a),
  cos: (use, node, a) => use.negate(use.multiply(use.graph.apply("sin", node.args[0]!), a)),
  tan: (use, node, a) => use.multiply(use.add(use.graph.number(1), use.multiply(node, node)), a),
  asin: (use, node, a) => {
    const square = use.multiply(node.args[0]!, node.args[0]!);
    const root = use.graph.apply("sqrt", use.subtract(use.graph.number(1), square));
    return use.multiply(a, use.reciprocal(root));
  },
};

/** Derivative of an inner node, given those of its arguments. */
export function innerDerivative(use: DerivativeArithmetic, node: Node, inside: readonly Node[]): Node {
  const inner = node as Inner; // called for inner nodes only
  const [a = use.zero, b = use.zero, c = use.zero] = inside;
  return derivatives[inner.operator](use, inner, a, b, c);
}
