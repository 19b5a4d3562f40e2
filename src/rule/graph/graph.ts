import type { LeafRole, Node, Operator } from "./node.js";
import { operations } from "./operations.js";

/** Hash-consed nodes: an equal expression gives the same node. */
export interface Graph {
  readonly number: (value: number) => Node;
  readonly leaf: (role: LeafRole, slot: number, offset?: number) => Node;
  /** Folds constants and drops operations without effect: x*1, x/1, x+0, x-0, x^1, -(-x). */
  readonly apply: (operator: Operator, ...inside: readonly Node[]) => Node;
  readonly size: () => number;
}

const commutative: ReadonlySet<Operator> = new Set(["add", "multiply", "min", "max", "equal", "and", "or"]);

const isNumber = (node: Node | undefined, value: number): boolean =>
  node?.kind === "number" && node.value === value;

/** The right identity element of an operator. */
const identityElements: Partial<Readonly<Record<Operator, number>>> = {
  add: 0,
  subtract: 0,
  multiply: 1,
  divide: 1,
  power: 1,
};

/** The argument that equals the result, if one does. */
function simplified(operator: Operator, a: Node, b: Node | undefined): Node | undefined {
  if (operator === "negate") return a.kind === "inner" && a.operator === "negate" ? a.args[0] : undefined;
  const unit = identityElements[operator];
  if (unit === undefined) return undefined;
  if (isNumber(b, unit)) return a;
  return commutative.has(operator) && isNumber(a, unit) ? b : undefined;
}

export function createGraph(): Graph {
  const interned = new Map<string, Node>();
  const intern = (key: string, make: (id: number) => Node): Node => {
    let node = interned.get(key);
    if (node === undefined) {
      node = make(interned.size);
      interned.set(key, node);
    }
    return node;
  };
  const number = (value: number): Node =>
    intern(`#${Object.is(value, -0) ? "-0" : value}`, (id) => ({ kind: "number", id, value }));
  const apply = (operator: Operator, ...given: readonly Node[]): Node => {
    const [a, b, c] = given;
    if (given.every((node) => node.kind === "number")) {
      const [x = 0, y = 0, z = 0] = given.map((node) => node.value);
      return number(operations[operator].value(x, y, z));
    }
    if (operator === "choose" && a!.kind === "number") return a!.value === 1 ? b! : c!;
    const same = simplified(operator, a!, b);
    if (same !== undefined) return same;
    const inside = commutative.has(operator) ? [...given].sort((p, q) => p.id - q.id) : given;
    const key = `${operator}(${inside.map((node) => node.id).join()})`;
    return intern(key, (id) => ({ kind: "inner", id, operator, args: inside }));
  };
  return {
    number,
    leaf: (role, slot, offset = 0) =>
      intern(`${role}[${slot}]${offset}`, (id) => ({ kind: "leaf", id, role, slot, offset })),
    apply,
    size: () => interned.size,
  };
}
