import { missingOperatorError, ruleError } from "../errors.js";
import type { BinaryOperator, Expression } from "./expression.js";
import { parseOperand } from "./parse-operand.js";
import { binaryPrecedence, comparisonPrecedence } from "./precedence.js";
import type { Token } from "./token.js";
import { placeBefore, type TokenReader } from "./token-reader.js";

function rejectChainedComparison(reader: TokenReader, operator: Token): void {
  if (
    binaryPrecedence(reader.peek()) !== comparisonPrecedence ||
    binaryPrecedence(operator) !== comparisonPrecedence
  )
    return;
  throw ruleError(
    "chained-comparison",
    reader.text,
    reader.peek(),
    "Comparisons cannot be chained.",
    "Join two comparisons with and, as in 0 < N and N < K.",
  );
}

/** Rejects what can only be a product without its sign, or a stray symbol, after a complete value. */
function rejectImpliedProduct(reader: TokenReader, left: Expression): void {
  const next = reader.peek();
  const opens = next.kind === "sign" && (next.text === "(" || next.text === "Δ");
  if (next.kind !== "name" && next.kind !== "number" && !opens) return;
  if (binaryPrecedence(next) > 0) return;
  if (next.kind === "name" && next.text === "not") return;
  const last = reader.text.slice(left.start, left.end);
  const right = next.text === "(" ? "( ... )" : next.text;
  throw missingOperatorError(reader.text, { start: left.end, end: next.end }, last.slice(-30), right);
}

/** Reads one expression whose operators all bind at least as tightly as `least`. */
export function parseExpression(reader: TokenReader, minPrecedence = 1): Expression {
  return reader.nested(() => {
    let left = parseOperand(reader, parseExpression);
    rejectImpliedProduct(reader, left);
    for (
      let operator = reader.peek();
      binaryPrecedence(operator) >= minPrecedence;
      operator = reader.peek()
    ) {
      left = parseRest(reader, left);
      rejectChainedComparison(reader, operator);
    }
    return left;
  });
}

/** Reads a binary operator and its right operand. `^` groups to the right, all others to the left. */
function parseRest(reader: TokenReader, left: Expression): Expression {
  const operator = reader.take();
  const own = binaryPrecedence(operator);
  if (reader.peek().kind === "newline" || reader.peek().kind === "end") {
    throw ruleError(
      "missing-value",
      reader.text,
      operator,
      `A value is missing after "${operator.text}", ${placeBefore(reader.peek())}.`,
      "Add the value, or remove the operator.",
    );
  }
  const right = parseExpression(reader, operator.text === "^" ? own : own + 1);
  reader.count(operator);
  return {
    kind: "binary",
    operator: operator.text as BinaryOperator, // only the signs and words of `strengths` get here
    left,
    right,
    start: left.start,
    end: right.end,
  };
}
