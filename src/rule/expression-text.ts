import type { Expression } from "./syntax/expression.js";
import { notPrecedence, precedence, unaryMinusPrecedence } from "./syntax/precedence.js";

const atomPrecedence = 10;

const period = (offset: number): string => {
  if (offset === 0) return "";
  return offset > 0 ? `[t+${offset}]` : `[t-${-offset}]`;
};

function precedenceOf(at: Expression): number {
  if (at.kind === "binary") return precedence.get(at.operator)!;
  if (at.kind === "unary") return at.operator === "-" ? unaryMinusPrecedence : notPrecedence;
  return atomPrecedence;
}

/** No spaces around powers and products, spaces around sums and comparisons. */
const spaced = (operator: string): string =>
  operator === "*" || operator === "/" || operator === "^" ? operator : ` ${operator} `;

function grouped(at: Expression, minPrecedence: number): string {
  const source = expressionText(at);
  return precedenceOf(at) < minPrecedence ? `(${source})` : source;
}

/** Canonical text of one expression, without redundant brackets. */
export function expressionText(at: Expression): string {
  switch (at.kind) {
    case "number":
      return String(at.value);
    case "name":
      return `${at.name}${period(at.offset)}`;
    case "unary": {
      const minPrecedence = at.operator === "-" ? unaryMinusPrecedence : notPrecedence;
      return `${at.operator === "-" ? "-" : "not "}${grouped(at.operand, minPrecedence)}`;
    }
    case "binary": {
      const own = precedence.get(at.operator)!;
      const toTheRight = at.operator === "^";
      const chains = own === precedence.get("<");
      const left = grouped(at.left, toTheRight || chains ? own + 1 : own);
      const right = groupedRight(at.right, toTheRight ? own : own + 1);
      return `${left}${spaced(at.operator)}${right}`;
    }
    case "call":
      return `${at.name}(${at.args.map(expressionText).join(", ")})`;
  }
}

/** A signed right operand is bracketed for the reader: a*(-b), although a*-b means the same. */
const groupedRight = (at: Expression, minPrecedence: number): string =>
  at.kind === "unary" ? `(${expressionText(at)})` : grouped(at, minPrecedence);
