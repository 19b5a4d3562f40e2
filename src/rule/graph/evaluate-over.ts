import { graphOrder } from "./graph-order.js";
import type { Node, Operator } from "./node.js";

/** A number system in which a graph can be evaluated: exact fractions, intervals. */
export interface Algebra<T> {
  readonly number: (value: number) => T;
  readonly operations: Readonly<Record<Operator, (a: T, b: T, c: T) => T>>;
}

type Leaf = Extract<Node, { kind: "leaf" }>;

/** Evaluates nodes in another algebra; `leafValue` gives the value of a leaf. */
export function evaluatorOver<T>(
  roots: readonly Node[],
  algebra: Algebra<T>,
): (leafValue: (leaf: Leaf) => T) => readonly T[] {
  const ordered = graphOrder(roots);
  const place = new Map(ordered.map((node, index) => [node, index]));
  const insides = ordered.map((node) =>
    node.kind === "inner" ? node.args.map((part) => place.get(part)!) : [],
  );
  const tape: T[] = new Array(ordered.length);
  return (leafValue) => {
    ordered.forEach((node, index) => {
      if (node.kind === "number") tape[index] = algebra.number(node.value);
      else if (node.kind === "leaf") tape[index] = leafValue(node);
      else {
        const [a = 0, b = a, c = a] = insides[index]!;
        tape[index] = algebra.operations[node.operator](tape[a]!, tape[b]!, tape[c]!);
      }
    });
    return roots.map((node) => tape[place.get(node)!]!);
  };
}
