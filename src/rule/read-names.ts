import type { Expression } from "./syntax/expression.js";

/** The names that an expression reads, with the period of each. */
export function readNames(at: Expression): readonly Extract<Expression, { kind: "name" }>[] {
  switch (at.kind) {
    case "number":
      return [];
    case "name":
      return [at];
    case "unary":
      return readNames(at.operand);
    case "binary":
      return [...readNames(at.left), ...readNames(at.right)];
    case "call":
      return at.args.flatMap(readNames);
  }
}
