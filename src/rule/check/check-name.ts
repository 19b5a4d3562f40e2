import { ruleError } from "../errors.js";
import { reservedWords } from "../functions.js";
import type { Expression } from "../syntax/expression.js";
import { type Names, undeclaredNameError } from "./names.js";

type Name = Extract<Expression, { kind: "name" }>;

/** A year of days back, and no more: every lag is one more value to carry along. */
export const largestLag = 400;

function checkState(names: Names, at: Name): void {
  if (at.offset > 0) {
    const wrong = `"${at.name}[t+${at.offset}]" is a value of the future on the right of a line.`;
    const remedy =
      "Only inputs may be read at [t+1]. Name the part that both lines share as a quantity above them.";
    throw ruleError("future-value", names.text, at, wrong, remedy);
  }
  if (-at.offset > largestLag) {
    const wrong = `"${at.name}" is read ${-at.offset} periods back, more than the ${largestLag} that are kept.`;
    throw ruleError(
      "lag-too-long",
      names.text,
      at,
      wrong,
      "Use a longer period, or an input that holds the past value.",
    );
  }
  if (at.offset < 0) names.lags.set(at.name, Math.max(names.lags.get(at.name) ?? 0, -at.offset));
}

function checkQuantity(names: Names, at: Name, line: number): void {
  const setAt = names.quantityLines.get(at.name)!;
  if (at.offset !== 0) {
    const wrong = `"${at.name}" is a quantity inside the period; its other periods are not kept.`;
    const remedy = `To read it later make it a state: begin its line with ${at.name}[t+1] = ...`;
    throw ruleError("quantity-of-another-period", names.text, at, wrong, remedy);
  }
  if (setAt < line) return;
  const wrong =
    setAt === line
      ? `"${at.name}" is set from itself.`
      : `"${at.name}" is read here and set only on line ${setAt + 1}; quantities are worked out from the top down.`;
  const remedy =
    setAt === line
      ? `Write the next value as ${at.name}[t+1] = ... or give the quantity another name.`
      : "Move its line above this one; where two lines need each other, write one of them out.";
  throw ruleError("cyclic-quantity", names.text, at, wrong, remedy);
}

function checkInput(names: Names, at: Name): void {
  names.usedInputs.add(at.name);
  if (at.offset <= 1) return;
  const wrong = `"${at.name}[t+${at.offset}]" lies beyond the period that the step leads to.`;
  throw ruleError("future-value", names.text, at, wrong, `An input may be read up to ${at.name}[t+1].`);
}

function checkParameter(names: Names, at: Name): void {
  if (reservedWords.has(at.name)) {
    const wrong = `"${at.name}" is not free to be used as a name.`;
    throw ruleError("reserved-name", names.text, at, wrong, "Choose another name for it.");
  }
  if (names.declared !== undefined && !names.declared.has(at.name))
    throw undeclaredNameError(names, at, at.name);
  if (at.offset !== 0) {
    const wrong = `"${at.name}" is a parameter and has no value of its own in other periods.`;
    const remedy = `If it is recorded by period, declare it: { inputs: ["${at.name}"] }.`;
    throw ruleError("parameter-of-another-period", names.text, at, wrong, remedy);
  }
  if (names.declared === undefined && (at.name === "e" || at.name === "pi")) {
    const value = at.name === "e" ? "exp(1)" : "3.141592653589793";
    const wrong = `"${at.name}" is not taken for a number of mathematics.`;
    const remedy = `Write ${value}, or declare it as a parameter of your own: { parameters: ["${at.name}", ...] }.`;
    throw ruleError("undeclared-number", names.text, at, wrong, remedy);
  }
  if (!names.parameters.has(at.name)) names.parameters.set(at.name, at);
}

/** Checks one name on the right of line number `line` and notes how it is used. */
export function checkName(names: Names, at: Name, line: number): void {
  if (at.name === "t") {
    if (at.offset === 0) return;
    const wrong = "t is the period index itself and is not read at another period.";
    throw ruleError("future-value", names.text, at, wrong, "Write t + 1 or t - 1.");
  }
  if (names.states.has(at.name)) checkState(names, at);
  else if (names.quantityLines.has(at.name)) checkQuantity(names, at, line);
  else if (names.inputs.has(at.name)) checkInput(names, at);
  else checkParameter(names, at);
}
