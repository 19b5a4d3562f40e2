import type { Node } from "./node.js";

/** Topological order: the roots and all nodes below them, arguments first. */
export function graphOrder(roots: readonly Node[]): readonly Node[] {
  const ordered = new Set<Node>();
  const visit = (node: Node): void => {
    if (ordered.has(node)) return;
    if (node.kind === "inner") node.args.forEach(visit);
    ordered.add(node);
  };
  roots.forEach(visit);
  return [...ordered];
}
