import type { Span } from "./token.js";

export type UnaryOperator = "-" | "not";
export type BinaryOperator =
  | "+"
  | "-"
  | "*"
  | "/"
  | "^"
  | "<"
  | "<="
  | ">"
  | ">="
  | "=="
  | "!="
  | "and"
  | "or";

/** Syntax tree of an expression, with positions in the text. */
export type Expression =
  | (Span & { readonly kind: "number"; readonly value: number })
  /** `X` and `X[t]` have offset 0, `X[t-2]` has -2, `X[t+1]` has 1. */
  | (Span & { readonly kind: "name"; readonly name: string; readonly offset: number })
  | (Span & { readonly kind: "unary"; readonly operator: UnaryOperator; readonly operand: Expression })
  | (Span & {
      readonly kind: "binary";
      readonly operator: BinaryOperator;
      readonly left: Expression;
      readonly right: Expression;
    })
  | (Span & { readonly kind: "call"; readonly name: string; readonly args: readonly Expression[] });

/** One line of a rule: the next value of a state, its change, or a quantity within the period. */
export interface Statement extends Span {
  readonly kind: "next" | "change" | "quantity";
  readonly name: string;
  readonly nameAt: Span;
  readonly expression: Expression;
}
