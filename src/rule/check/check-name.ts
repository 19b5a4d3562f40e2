import { ruleError } from "../errors.js";
import { reservedWords } from "../functions.js";
import type { Expression } from "../syntax/expression.js";
import { type Names, undeclaredNameError } from "./names.js";

type Name = Extract<Expression, { kind: "name" }>;

/** A little more than a year of days: every lag adds a value to the state vector. */
export const largestLag = 400;

function checkState(names: Names, at: Name): void {
  if (at.offset > 0) {
    const wrong = `"${at.name}[t+${at.offset}]" is a future value, and cannot be read on the right-hand side.`;
    const remedy =
      "Only inputs can be read at [t+1]. Define the shared part as a quantity on a line above, and use it in both lines.";
    throw ruleError("future-value", names.text, at, wrong, remedy);
  }
  if (-at.offset > largestLag) {
    const wrong = `"${at.name}" is read ${-at.offset} periods back; the limit is ${largestLag}.`;
    throw ruleError(
      "lag-too-long",
      names.text,
      at,
      wrong,
      "Use a longer period, or record the past value as an input.",
    );
  }
  if (at.offset < 0) names.lags.set(at.name, Math.max(names.lags.get(at.name) ?? 0, -at.offset));
}

function checkQuantity(names: Names, at: Name, line: number): void {
  const setAt = names.quantityLines.get(at.name)!;
  if (at.offset !== 0) {
    const wrong = `"${at.name}" is a quantity within the period; its values in other periods are not stored.`;
    const remedy = `To read it in a later period, make it a state: start its line with ${at.name}[t+1] = ...`;
    throw ruleError("quantity-of-another-period", names.text, at, wrong, remedy);
  }
  if (setAt < line) return;
  const wrong =
    setAt === line
      ? `"${at.name}" is defined by itself.`
      : `"${at.name}" is used here but defined on line ${setAt + 1}; lines are evaluated from top to bottom.`;
  const remedy =
    setAt === line
      ? `For the next value, write ${at.name}[t+1] = ...; otherwise give the quantity another name.`
      : `Move line ${setAt + 1} above this one. If the two lines depend on each other, write one expression into the other.`;
  throw ruleError("cyclic-quantity", names.text, at, wrong, remedy);
}

function checkInput(names: Names, at: Name): void {
  names.usedInputs.add(at.name);
  if (at.offset <= 1) return;
  const wrong = `"${at.name}[t+${at.offset}]" is beyond the next period.`;
  throw ruleError("future-value", names.text, at, wrong, `Inputs can be read up to ${at.name}[t+1].`);
}

/** N_t of a textbook would be read as one more parameter. */
function rejectSubscriptPeriod(names: Names, at: Name): void {
  const base = /^(.+)_t$/u.exec(at.name)?.[1];
  if (base === undefined || !(names.states.has(base) || names.inputs.has(base))) return;
  const wrong = `"${at.name}" would be a parameter of its own, not a value of ${base}.`;
  throw ruleError(
    "subscript-period",
    names.text,
    at,
    wrong,
    `For the present value, write ${base} or ${base}[t].`,
  );
}

function checkParameter(names: Names, at: Name): void {
  if (reservedWords.has(at.name)) {
    const wrong = `"${at.name}" is a reserved word.`;
    throw ruleError("reserved-name", names.text, at, wrong, "Choose another name.");
  }
  if (names.declared !== undefined && !names.declared.has(at.name))
    throw undeclaredNameError(names, at, at.name);
  if (names.declared === undefined) rejectSubscriptPeriod(names, at);
  if (at.offset !== 0) {
    const wrong = `"${at.name}" is a parameter, which has one value for all periods.`;
    const remedy = `If ${at.name} is recorded by period, declare it as an input: { inputs: ["${at.name}"] }.`;
    throw ruleError("parameter-of-another-period", names.text, at, wrong, remedy);
  }
  if (names.declared === undefined && (at.name === "e" || at.name === "pi")) {
    const value = at.name === "e" ? "For e^x, write exp(x)" : "For the number pi, write 3.141592653589793";
    const wrong = `"${at.name}" is not predefined.`;
    const remedy = `${value}. To use ${at.name} as a parameter, declare it: { parameters: ["${at.name}", ...] }.`;
    throw ruleError("undeclared-number", names.text, at, wrong, remedy);
  }
  if (!names.parameters.has(at.name)) names.parameters.set(at.name, at);
}

/** Checks one name on the right of line number `line` and notes how it is used. */
export function checkName(names: Names, at: Name, line: number): void {
  if (at.name === "t") {
    if (at.offset === 0) return;
    const wrong = "t is the period index itself and takes no index.";
    throw ruleError("future-value", names.text, at, wrong, "Write t + 1 or t - 1.");
  }
  if (names.states.has(at.name)) checkState(names, at);
  else if (names.quantityLines.has(at.name)) checkQuantity(names, at, line);
  else if (names.inputs.has(at.name)) checkInput(names, at);
  else checkParameter(names, at);
}
