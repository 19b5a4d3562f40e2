import type { BinaryOperator, Expression } from "../syntax/expression.js";
import { notPrecedence, precedence, unaryMinusPrecedence } from "../syntax/precedence.js";
import { texNumber } from "./tex-number.js";

/** Typesets a name: a symbol with its period, or a fitted number. */
export type SetName = (name: string, offset: number) => string;

const signs: Partial<Readonly<Record<BinaryOperator, string>>> = {
  "<=": "\\le",
  ">=": "\\ge",
  "==": "=",
  "!=": "\\ne",
  and: "\\text{ and }",
  or: "\\text{ or }",
};

const bracketed = (inside: string): string => `\\left(${inside}\\right)`;

const isNegative = (set: string): boolean => set.startsWith("-");

function precedenceOf(at: Expression, set: string): number {
  if (at.kind === "binary") return at.operator === "/" ? 10 : precedence.get(at.operator)!;
  if (at.kind === "unary") return at.operator === "-" ? unaryMinusPrecedence : notPrecedence;
  // A fitted value may be negative or a power of ten.
  if (isNegative(set)) return unaryMinusPrecedence - 1.5;
  return set.includes("\\times") ? precedence.get("*")! : 10;
}

function grouped(at: Expression, minPrecedence: number, name: SetName): string {
  const set = texExpression(at, name);
  return precedenceOf(at, set) < minPrecedence ? bracketed(set) : set;
}

/** Products are written side by side; a dot separates a number from the factor before it. */
const product = (left: string, right: string): string =>
  /^[\d.]/u.test(right) ? `${left} \\cdot ${right}` : `${left}\\,${right}`;

function texBinary(at: Extract<Expression, { kind: "binary" }>, name: SetName): string {
  const { operator, left, right } = at;
  if (operator === "/") return `\\frac{${texExpression(left, name)}}{${texExpression(right, name)}}`;
  if (operator === "^") {
    const base = left.kind === "binary" ? bracketed(texExpression(left, name)) : grouped(left, 9, name);
    return `${base.includes("^") ? bracketed(base) : base}^{${texExpression(right, name)}}`;
  }
  const own = precedence.get(operator)!;
  const first = grouped(left, own, name);
  const second = grouped(right, own + 1, name);
  if (operator === "*") return product(first, second);
  return `${first} ${signs[operator] ?? operator} ${second}`;
}

const functionNames: Readonly<Record<string, string>> = {
  exp: "\\exp",
  log: "\\ln",
  log10: "\\log_{10}",
  min: "\\min",
  max: "\\max",
  sin: "\\sin",
  cos: "\\cos",
  tan: "\\tan",
  asin: "\\arcsin",
  sign: "\\operatorname{sgn}",
};

function texCall(at: Extract<Expression, { kind: "call" }>, name: SetName): string {
  const [a = "", b = "", c = ""] = at.args.map((part) => texExpression(part, name));
  if (at.name === "sqrt") return `\\sqrt{${a}}`;
  if (at.name === "abs") return `\\left|${a}\\right|`;
  if (at.name === "floor") return `\\left\\lfloor ${a} \\right\\rfloor`;
  if (at.name === "ceil") return `\\left\\lceil ${a} \\right\\rceil`;
  if (at.name === "if") {
    return `\\begin{cases} ${b} & \\text{if } ${a} \\\\ ${c} & \\text{otherwise} \\end{cases}`;
  }
  if (at.name === "mod") return bracketed(`${a} \\bmod ${b}`);
  if (at.name === "round") return `\\operatorname{round}_{${b === "" ? "0" : b}}${bracketed(a)}`;
  const inside = at.args.map((part) => texExpression(part, name)).join(", ");
  return `${functionNames[at.name]}${bracketed(inside)}`;
}

/** TeX of one expression. */
export function texExpression(at: Expression, name: SetName): string {
  switch (at.kind) {
    case "number":
      return texNumber(at.value);
    case "name":
      return name(at.name, at.offset);
    case "unary":
      return at.operator === "-"
        ? `-${grouped(at.operand, unaryMinusPrecedence, name)}`
        : `\\text{not } ${grouped(at.operand, notPrecedence, name)}`;
    case "binary":
      return texBinary(at, name);
    case "call":
      return texCall(at, name);
  }
}
