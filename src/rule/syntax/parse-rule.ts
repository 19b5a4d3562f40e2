import { ruleError } from "../errors.js";
import { reservedWords } from "../functions.js";
import type { Statement } from "./expression.js";
import { lineRemedy } from "./other-notations.js";
import { parseExpression } from "./parse-expression.js";
import { parseOffset } from "./parse-offset.js";
import { binaryPrecedence } from "./precedence.js";
import type { Token } from "./token.js";
import { type TokenReader, tokenReader } from "./token-reader.js";

const forms =
  "Each line sets the next value of a state (N[t+1] = ...), its change (ΔN = ...) or a quantity within the period (paid = ...).";

type Target = Pick<Statement, "kind" | "name" | "nameAt">;

function takeName(reader: TokenReader): Token {
  const name = reader.take();
  if (name.kind === "name" && !reservedWords.has(name.text)) return name;
  const wrong =
    name.kind === "name"
      ? `"${name.text}" is a reserved word and cannot be set.`
      : "A line must start with the name it sets.";
  throw ruleError("unreadable-line", reader.text, name, wrong, forms);
}

function parseTarget(reader: TokenReader): Target {
  if (reader.accept("Δ")) {
    const name = takeName(reader);
    return { kind: "change", name: name.text, nameAt: name };
  }
  if (reader.peek().text === "change" && reader.peek(1).text === "(") {
    reader.take();
    reader.take();
    const name = takeName(reader);
    reader.expect(")", "Write the name of one state, as in change(N) = r*N.");
    return { kind: "change", name: name.text, nameAt: name };
  }
  const name = takeName(reader);
  const bracket = reader.peek();
  const { offset, end } = parseOffset(reader, name);
  if (bracket.text !== "[") return { kind: "quantity", name: name.text, nameAt: name };
  if (offset === 1) return { kind: "next", name: name.text, nameAt: { start: name.start, end } };
  const wrong = `A line can only set the next value of "${name.text}".`;
  throw ruleError(
    "unreadable-line",
    reader.text,
    { start: name.start, end },
    wrong,
    `Write ${name.text}[t+1] = ...`,
  );
}

function expectEquals(reader: TokenReader, from: Token): void {
  if (reader.accept("=")) return;
  const found = reader.peek();
  const joins = binaryPrecedence(found) > 0 || found.kind === "newline" || found.kind === "end";
  const place = joins ? { start: from.start, end: Math.max(from.end, found.start) } : found;
  const remedy = lineRemedy(reader.text, from.start) ?? forms;
  throw ruleError("unreadable-line", reader.text, place, "This line does not set anything.", remedy);
}

function parseStatement(reader: TokenReader): Statement {
  const first = reader.peek();
  const target = parseTarget(reader);
  expectEquals(reader, first);
  const expression = parseExpression(reader);
  const after = reader.peek();
  if (after.kind !== "newline" && after.kind !== "end") {
    const remedy =
      after.text === "="
        ? "To compare, write ==. To set another quantity, start a new line."
        : after.text === ","
          ? "Use a decimal point, as in 0.5."
          : "Remove it, or add the opening bracket.";
    throw ruleError("stray-sign", reader.text, after, `"${after.text}" is not expected here.`, remedy);
  }
  return { ...target, expression, start: first.start, end: expression.end };
}

/** Reads a rule's text, already normalised, into its lines. Nothing is known yet of what the names mean. */
export function parseRule(text: string): readonly Statement[] {
  const reader = tokenReader(text);
  const statements: Statement[] = [];
  for (;;) {
    while (reader.peek().kind === "newline") reader.take();
    if (reader.peek().kind === "end") break;
    statements.push(parseStatement(reader));
  }
  if (statements.length > 0) return statements;
  throw ruleError("empty-rule", text, reader.peek(), "The rule is empty.", forms);
}
