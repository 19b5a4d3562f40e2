import type { CheckedRule } from "../check/checked-rule.js";
import type { BinaryOperator, Expression } from "../syntax/expression.js";
import { createGraph, type Graph } from "./graph.js";
import type { Node, Operator } from "./node.js";
import { powerOf } from "./power.js";
import type { RuleGraph } from "./rule-graph.js";

/** Every lagged value in the state vector: for each state with lags, lag 1 up to the largest one read. */
export function laggedStates(rule: CheckedRule): readonly { readonly state: string; readonly lag: number }[] {
  return rule.states.flatMap((state) =>
    Array.from({ length: rule.lags.get(state) ?? 0 }, (_, index) => ({ state, lag: index + 1 })),
  );
}

const directOperators: Partial<Readonly<Record<BinaryOperator, Operator>>> = {
  "+": "add",
  "-": "subtract",
  "*": "multiply",
  "/": "divide",
  "<": "less",
  "<=": "lessOrEqual",
  "==": "equal",
  and: "and",
  or: "or",
};

function join(graph: Graph, operator: BinaryOperator, left: Node, right: Node): Node {
  if (operator === "^") return powerOf(graph, left, right);
  if (operator === ">") return graph.apply("less", right, left);
  if (operator === ">=") return graph.apply("lessOrEqual", right, left);
  if (operator === "!=") return graph.apply("not", graph.apply("equal", left, right));
  return graph.apply(directOperators[operator]!, left, right); // every other operator is in the table
}

function callOf(graph: Graph, name: string, inside: readonly Node[]): Node {
  const [first] = inside;
  if (name === "min" || name === "max") return inside.reduce((a, b) => graph.apply(name, a, b));
  if (name === "if") return graph.apply("choose", ...inside);
  if (name === "round") return graph.apply("round", first!, inside[1] ?? graph.number(0));
  return graph.apply(name as Operator, ...inside); // the remaining functions are operators by the same name
}

/** Turns a checked expression into a node; `meaningOf` gives the node of a name. */
function nodeOf(graph: Graph, at: Expression, nodeOfName: (name: string, offset: number) => Node): Node {
  switch (at.kind) {
    case "number":
      return graph.number(at.value);
    case "name":
      return nodeOfName(at.name, at.offset);
    case "unary":
      return graph.apply(at.operator === "-" ? "negate" : "not", nodeOf(graph, at.operand, nodeOfName));
    case "binary":
      return join(
        graph,
        at.operator,
        nodeOf(graph, at.left, nodeOfName),
        nodeOf(graph, at.right, nodeOfName),
      );
    case "call":
      return callOf(
        graph,
        at.name,
        at.args.map((part) => nodeOf(graph, part, nodeOfName)),
      );
  }
}

/** Builds the graph of a checked rule. */
export function buildGraph(rule: CheckedRule): RuleGraph {
  const graph = createGraph();
  const lags = laggedStates(rule);
  const quantities = new Map<string, Node>();
  const next = new Map<string, Node>();
  const stateAt = (name: string, lag: number): Node => {
    if (lag === 0) return graph.leaf("state", rule.states.indexOf(name));
    const slot = lags.findIndex((kept) => kept.state === name && kept.lag === lag);
    return graph.leaf("state", rule.states.length + slot);
  };
  const nodeOfName = (name: string, offset: number): Node => {
    if (name === "t") return graph.leaf("period", 0);
    if (rule.states.includes(name)) return stateAt(name, -offset);
    if (rule.inputs.includes(name)) return graph.leaf("input", rule.inputs.indexOf(name), offset);
    return quantities.get(name) ?? graph.leaf("parameter", rule.parameters.indexOf(name));
  };
  for (const { kind, name, expression } of rule.statements) {
    const node = nodeOf(graph, expression, nodeOfName);
    if (kind === "quantity") quantities.set(name, node);
    else next.set(name, kind === "next" ? node : graph.apply("add", stateAt(name, 0), node));
  }
  return {
    graph,
    next: [
      ...rule.states.map((state) => next.get(state)!),
      ...lags.map(({ state, lag }) => stateAt(state, lag - 1)),
    ],
    quantities: rule.quantities.map((name) => quantities.get(name)!),
    states: rule.states.length + lags.length,
    observed: rule.states.length,
    parameters: rule.parameters.length,
    inputs: rule.inputs.length,
  };
}
