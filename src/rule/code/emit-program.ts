import type { LeafRole, Node } from "../graph/node.js";
import { operations } from "../graph/operations.js";

/** Source for a set of nodes, divided into loop-invariant lines and the body of the loop. */
export interface EmittedProgram {
  readonly preamble: readonly string[];
  readonly body: readonly string[];
  /** The expression for a node's value inside the loop. */
  readonly read: (node: Node) => string;
}

/** Deeper expressions are cut into local variables, to spare the compiler's stack. */
const maxDepth = 24;

interface GraphUse {
  readonly uses: Map<Node, number>;
  readonly varies: Map<Node, boolean>;
  readonly ordered: Node[];
}

/** Leaves that are constant in a loop over periods. */
const parametersOnly: ReadonlySet<LeafRole> = new Set(["parameter"]);

/** Counts uses, finds which nodes vary in the loop, and orders arguments before the nodes that use them. */
function analyze(roots: readonly Node[], fixed: ReadonlySet<LeafRole>): GraphUse {
  const use: GraphUse = { uses: new Map(), varies: new Map(), ordered: [] };
  const visit = (node: Node): void => {
    use.uses.set(node, (use.uses.get(node) ?? 0) + 1);
    if (use.varies.has(node)) return;
    if (node.kind === "inner") for (const part of node.args) visit(part);
    const varies =
      node.kind === "leaf"
        ? !fixed.has(node.role)
        : node.kind === "inner" && node.args.some((part) => use.varies.get(part)!);
    use.varies.set(node, varies);
    use.ordered.push(node);
  };
  roots.forEach(visit);
  return use;
}

function numberSource(value: number): string {
  if (Number.isNaN(value)) return "NaN";
  if (value < 0 || Object.is(value, -0)) return `(${Object.is(value, -0) ? "-0" : value})`;
  return String(value);
}

/** Names come from roles and slots alone, never from the rule's text. */
function leafSource(node: Extract<Node, { kind: "leaf" }>): string {
  if (node.role === "state") return `s${node.slot}`;
  if (node.role === "parameter") return `c${node.slot}`;
  if (node.role === "period") return "t";
  return node.offset === 0 ? `u${node.slot}[t]` : `u${node.slot}[t + ${node.offset}]`.replace("+ -", "- ");
}

/** Whether a node gets a variable: it is used twice, nested deeply, or loop-invariant. */
function needsVariable(node: Node, use: GraphUse, depth: number): boolean {
  if (node.kind === "leaf") return node.role === "input";
  return node.kind === "inner" && (use.uses.get(node)! > 1 || depth > maxDepth || !use.varies.get(node)!);
}

/**
 * Writes source for the roots and everything below them. Variables are `v` and the node's id; leaves must be
 * in scope as s0, c0, u0, t. `fixed` are the roles whose leaves are constant in the loop.
 */
export function emitProgram(
  roots: readonly Node[],
  fixed: ReadonlySet<LeafRole> = parametersOnly,
): EmittedProgram {
  const use = analyze(roots, fixed);
  const preamble: string[] = [];
  const body: string[] = [];
  const sources = new Map<Node, string>();
  const depths = new Map<Node, number>();
  for (const node of use.ordered) {
    if (node.kind === "number") {
      sources.set(node, numberSource(node.value));
      continue;
    }
    let source = node.kind === "leaf" ? leafSource(node) : innerSource(node, sources);
    let depth = node.kind === "leaf" ? 0 : 1 + Math.max(...node.args.map((part) => depths.get(part) ?? 0));
    if (needsVariable(node, use, depth)) {
      (use.varies.get(node)! ? body : preamble).push(`const v${node.id} = ${source};`);
      source = `v${node.id}`;
      depth = 0;
    }
    sources.set(node, source);
    depths.set(node, depth);
  }
  return { preamble: preamble, body: body, read: (node) => sources.get(node)! };
}

function innerSource(node: Extract<Node, { kind: "inner" }>, sources: ReadonlyMap<Node, string>): string {
  const [a = "", b = "", c = ""] = node.args.map((part) => sources.get(part)!);
  return operations[node.operator].code(a, b, c);
}
