import { ruleError, unknownFunctionError } from "../errors.js";
import { ruleFunction, ruleFunctions } from "../functions.js";
import type { Expression } from "./expression.js";
import { parseOffset } from "./parse-offset.js";
import { notPrecedence, unaryMinusPrecedence } from "./precedence.js";
import type { Token } from "./token.js";
import { placeBefore, type TokenReader } from "./token-reader.js";

/** How a nested expression is read; handed in, because an expression is made of operands. */
type ReadExpression = (reader: TokenReader, least?: number) => Expression;

/** Reads a value with the signs in front of it: a number, a name, a call, a group, or -x, not x. */
export function parseOperand(reader: TokenReader, read: ReadExpression): Expression {
  const token = reader.peek();
  reader.count(token);
  if (token.kind === "number") return parseNumber(reader);
  if (token.kind === "name") return token.text === "not" ? parseUnary(reader, read) : parseName(reader, read);
  if (token.text === "-") return parseUnary(reader, read);
  if (token.text === "(") return parseGroup(reader, read);
  throw missingValueError(reader, token);
}

function missingValueError(reader: TokenReader, token: Token): Error {
  if (token.text === "Δ") {
    return ruleError(
      "misplaced-change",
      reader.text,
      token,
      "The change sign stands inside an expression.",
      "A change may only begin a line, as in ΔN = r*N. Use N - N[t-1] for the last change.",
    );
  }
  const remedy =
    token.text === "+"
      ? "A value needs no plus sign in front."
      : token.text === "="
        ? "Write == to compare."
        : "Write a number, a name, a function or a bracket there.";
  return ruleError("missing-value", reader.text, token, `A value is missing ${placeBefore(token)}.`, remedy);
}

function parseNumber(reader: TokenReader): Expression {
  const { text, start, end } = reader.take();
  const value = Number(text);
  if (Number.isFinite(value)) return { kind: "number", value, start, end };
  throw ruleError(
    "number-too-large",
    reader.text,
    { start, end },
    `The number ${text} is too large for a computer number.`,
    "Use a larger unit.",
  );
}

function parseUnary(reader: TokenReader, read: ReadExpression): Expression {
  const sign = reader.take();
  const operator = sign.text === "not" ? "not" : "-";
  const operand = read(reader, operator === "not" ? notPrecedence : unaryMinusPrecedence);
  return { kind: "unary", operator, operand, start: sign.start, end: operand.end };
}

function parseGroup(reader: TokenReader, read: ReadExpression): Expression {
  const open = reader.take();
  skipNewlines(reader);
  const inside = read(reader);
  skipNewlines(reader);
  const close = reader.expect(")", "Close the bracket that was opened, or take the opening one away.");
  return { ...inside, start: open.start, end: close.end };
}

/** Inside brackets a line may be broken. */
function skipNewlines(reader: TokenReader): void {
  while (reader.peek().kind === "newline") reader.take();
}

function parseName(reader: TokenReader, read: ReadExpression): Expression {
  const name = reader.take();
  if (reader.peek().text === "(" && reader.peek().kind === "sign") return parseCall(reader, read, name);
  if (name.text === "and" || name.text === "or") {
    throw ruleError(
      "missing-value",
      reader.text,
      name,
      `A value is missing before "${name.text}".`,
      `Write a condition on both sides, as in N > 0 ${name.text} N < K.`,
    );
  }
  const found = ruleFunction(name.text);
  if (found !== undefined) {
    throw ruleError(
      "function-without-brackets",
      reader.text,
      name,
      `"${name.text}" is a function and stands without brackets.`,
      `Write ${found.usage}, or choose another name.`,
    );
  }
  const { offset, end } = parseOffset(reader, name);
  return { kind: "name", name: name.text, offset, start: name.start, end };
}

function parseCall(reader: TokenReader, read: ReadExpression, name: Token): Expression {
  const open = reader.take();
  if (ruleFunction(name.text) === undefined) {
    const place = { start: name.start, end: open.end };
    throw unknownFunctionError(
      reader.text,
      place,
      name.text,
      ruleFunctions.map((one) => one.name),
    );
  }
  const inside: Expression[] = [];
  skipNewlines(reader);
  if (!reader.accept(")")) {
    do {
      skipNewlines(reader);
      inside.push(read(reader));
      skipNewlines(reader);
    } while (reader.accept(","));
    reader.expect(")", `Close the bracket of ${name.text}( after its last value.`);
  }
  const end = reader.peek(-1).end;
  return { kind: "call", name: name.text, args: inside, start: name.start, end };
}
