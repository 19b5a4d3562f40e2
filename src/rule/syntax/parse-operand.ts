import { misplacedChangeRemedy, ruleError, unknownFunctionError } from "../errors.js";
import { ruleFunction } from "../functions.js";
import type { Expression } from "./expression.js";
import { callRemedy } from "./other-notations.js";
import { parseOffset } from "./parse-offset.js";
import { notPrecedence, unaryMinusPrecedence } from "./precedence.js";
import type { Token } from "./token.js";
import { placeBefore, type TokenReader } from "./token-reader.js";

/** Reads a nested expression; passed in, because expressions and operands contain each other. */
type ReadExpression = (reader: TokenReader, least?: number) => Expression;

/** Reads an operand: a number, a name, a call, a group, or -x, not x. */
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
      "Δ can only start a line.",
      misplacedChangeRemedy,
    );
  }
  const remedy =
    token.text === "+"
      ? "Remove the plus sign."
      : token.text === "="
        ? "To compare, write ==."
        : "Write a number, a name, a function or a bracket here.";
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
    `The number ${text} is too large.`,
    "Use a larger unit, so that the numbers become smaller.",
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
  const close = reader.expect(")", "Close the bracket, or remove the opening one.");
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
      `Write a condition on both sides of ${name.text}, as in N > 0 ${name.text} N < K.`,
    );
  }
  const found = ruleFunction(name.text);
  if (found !== undefined) {
    throw ruleError(
      "function-without-brackets",
      reader.text,
      name,
      `"${name.text}" is a function and needs brackets.`,
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
    throw unknownFunctionError(reader.text, place, name.text, callRemedy(reader.text, place.end, name.text));
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
