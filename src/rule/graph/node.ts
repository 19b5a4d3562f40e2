/** The operation of an inner node. */
export type Operator =
  | "add"
  | "subtract"
  | "multiply"
  | "divide"
  | "power"
  | "negate"
  | "less"
  | "lessOrEqual"
  | "equal"
  | "and"
  | "or"
  | "not"
  | "choose"
  | "exp"
  | "log"
  | "log10"
  | "sqrt"
  | "abs"
  | "sign"
  | "min"
  | "max"
  | "floor"
  | "ceil"
  | "round"
  | "mod"
  | "sin"
  | "cos"
  | "tan"
  | "asin";

/** Where a leaf's value comes from. `slot` counts within the role; inputs also have an offset in periods. */
export type LeafRole = "state" | "parameter" | "input" | "period";

/**
 * A node of an expression graph. Equal expressions are one node (hash-consed), so identity is equality.
 * `id` grows in the order of creation, so arguments have smaller ids than the nodes that use them.
 */
export type Node =
  | { readonly kind: "number"; readonly id: number; readonly value: number }
  | {
      readonly kind: "leaf";
      readonly id: number;
      readonly role: LeafRole;
      readonly slot: number;
      readonly offset: number;
    }
  | {
      readonly kind: "inner";
      readonly id: number;
      readonly operator: Operator;
      readonly args: readonly Node[];
    };
