import type { Expression } from "./syntax/expression.js";
import { notStrength, strengths, unaryMinusStrength } from "./syntax/strengths.js";

const closest = 10;

const period = (offset: number): string => {
  if (offset === 0) return "";
  return offset > 0 ? `[t+${offset}]` : `[t-${-offset}]`;
};

function strengthOf(at: Expression): number {
  if (at.kind === "binary") return strengths.get(at.operator)!;
  if (at.kind === "unary") return at.operator === "-" ? unaryMinusStrength : notStrength;
  return closest;
}

/** Powers and products close up around their signs, sums and comparisons stand apart. */
const spaced = (operator: string): string =>
  operator === "*" || operator === "/" || operator === "^" ? operator : ` ${operator} `;

function grouped(at: Expression, least: number): string {
  const source = expressionText(at);
  return strengthOf(at) < least ? `(${source})` : source;
}

/** Canonical text of one expression, with no bracket that the order of operations makes needless. */
export function expressionText(at: Expression): string {
  switch (at.kind) {
    case "number":
      return String(at.value);
    case "name":
      return `${at.name}${period(at.offset)}`;
    case "unary": {
      const least = at.operator === "-" ? unaryMinusStrength : notStrength;
      return `${at.operator === "-" ? "-" : "not "}${grouped(at.operand, least)}`;
    }
    case "binary": {
      const own = strengths.get(at.operator)!;
      const toTheRight = at.operator === "^";
      const chains = own === strengths.get("<");
      const left = grouped(at.left, toTheRight || chains ? own + 1 : own);
      const right = groupedRight(at.right, toTheRight ? own : own + 1);
      return `${left}${spaced(at.operator)}${right}`;
    }
    case "call":
      return `${at.name}(${at.inside.map(expressionText).join(", ")})`;
  }
}

/** A sign in front of a right-hand value is bracketed for the reader: a*(-b), although a*-b reads the same. */
const groupedRight = (at: Expression, least: number): string =>
  at.kind === "unary" ? `(${expressionText(at)})` : grouped(at, least);
